import { useState } from 'react';
import type { ProjectResponse } from '#shared/schemas/project.ts';
import { Button } from '#src/components/Button.tsx';
import { Dialog } from '#src/components/Dialog.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { TextInput } from '#src/components/TextInput.tsx';
import { toast } from '#src/lib/toast.ts';
import { useUpdateProject } from '../api/projects.ts';
import { ProjectMembers } from './ProjectMembers.tsx';

interface ProjectDialogProps {
  readonly project: ProjectResponse;
  readonly open: boolean;
  readonly onOpenChange: (open: boolean) => void;
}

/** The project itself: what it and its machine are called, and with whom it is shared. */
export function ProjectDialog({ project, open, onOpenChange }: ProjectDialogProps) {
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      title="Project"
      description="Reviewers and leads of the team read every project; everybody else reads those shared with them."
    >
      <div className="flex flex-col gap-6">
        {project.abilities.rename ? (
          <Names key={project.id} project={project} />
        ) : (
          <p>
            {project.name}
            {project.machine !== '' && (
              <span className="block text-ink-soft">{project.machine}</span>
            )}
          </p>
        )}
        <ProjectMembers project={project} />
      </div>
    </Dialog>
  );
}

function Names({ project }: { project: ProjectResponse }) {
  const update = useUpdateProject(project.id);
  const [name, setName] = useState(project.name);
  const [machine, setMachine] = useState(project.machine);
  const lacking = name.trim() === '';
  const unchanged = name.trim() === project.name && machine.trim() === project.machine;
  return (
    <form
      noValidate
      className="flex flex-col gap-3"
      onSubmit={(event) => {
        event.preventDefault();
        if (lacking) return;
        update.mutate({ name, machine }, { onSuccess: () => toast('Names are kept') });
      }}
    >
      <TextInput
        label="Project name"
        maxLength={120}
        error={lacking ? 'Enter a name.' : undefined}
        value={name}
        onChange={(event) => setName(event.target.value)}
      />
      <TextInput
        label="Machine"
        maxLength={120}
        value={machine}
        onChange={(event) => setMachine(event.target.value)}
      />
      {update.error && <ErrorNote error={update.error} />}
      <Button
        type="submit"
        className="self-start"
        busy={update.isPending}
        disabled={unchanged || lacking}
      >
        Keep names
      </Button>
    </form>
  );
}
