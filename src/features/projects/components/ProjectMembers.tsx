import { useState } from 'react';
import type { ProjectResponse } from '#shared/schemas/project.ts';
import { Button } from '#src/components/Button.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Select } from '#src/components/Select.tsx';
import { useTeam } from '#src/hooks/useTeam.ts';
import { useShareProject } from '../api/projects.ts';

/** With whom the project is shared, and adding to them. */
export function ProjectMembers({ project }: { readonly project: ProjectResponse }) {
  const team = useTeam();
  const share = useShareProject(project.id);
  const [chosen, setChosen] = useState('');
  const may = project.abilities.manageMembers;
  const memberIds = new Set(project.members.map((member) => member.id));
  const others = (team.data?.people ?? []).filter(
    (person) => person.active && !memberIds.has(person.id),
  );
  return (
    <section aria-labelledby="members-heading">
      <h3 id="members-heading">Shared with</h3>
      <ul className="mt-1 border-t border-rule">
        {project.members.map((member) => (
          <li
            key={member.id}
            className="flex min-h-10 items-center justify-between gap-3 border-b border-rule"
          >
            <span className="min-w-0 break-words">
              {member.name} <span className="text-ink-soft">{member.role}</span>
            </span>
            {may && project.members.length > 1 && (
              <Button
                look="quiet"
                aria-label={`Stop sharing with ${member.name}`}
                busy={share.isPending}
                onClick={() => share.mutate({ personId: member.id, shared: false })}
              >
                Stop sharing
              </Button>
            )}
          </li>
        ))}
      </ul>
      {may && others.length > 0 && (
        <form
          className="mt-3 flex items-end gap-2"
          onSubmit={(event) => {
            event.preventDefault();
            if (chosen === '') return;
            share.mutate({ personId: chosen, shared: true }, { onSuccess: () => setChosen('') });
          }}
        >
          <Select
            className="min-w-0 flex-1"
            label="Share with"
            options={[
              { value: '', label: 'Choose a person' },
              ...others.map((person) => ({
                value: person.id,
                label: `${person.name}, ${person.role}`,
              })),
            ]}
            value={chosen}
            onValueChange={setChosen}
          />
          <Button type="submit" busy={share.isPending} disabled={chosen === ''}>
            Share
          </Button>
        </form>
      )}
      {share.error && (
        <div className="mt-3">
          <ErrorNote error={share.error} />
        </div>
      )}
    </section>
  );
}
