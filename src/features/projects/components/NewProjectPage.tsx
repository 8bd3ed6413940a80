import { Link, useSearchParams } from 'react-router-dom';
import { STARTERS } from '#shared/frame/starters/starters.ts';
import { Button } from '#src/components/Button.tsx';
import { EmptyState } from '#src/components/EmptyState.tsx';
import { PageHeading } from '#src/components/PageHeading.tsx';
import { usePerson } from '#src/hooks/useSession.ts';
import { BlankForm } from './BlankForm.tsx';
import { ImportForm } from './ImportForm.tsx';
import { BEGINNINGS, type Beginning } from './beginnings.ts';
import { StarterForm } from './StarterForm.tsx';

export default function NewProjectPage() {
  const person = usePerson();
  const [params, setParams] = useSearchParams();
  const chosen =
    BEGINNINGS.find((beginning) => beginning.id === params.get('from')) ?? BEGINNINGS[0];
  const starter = STARTERS.find((one) => one.id === chosen?.id);

  if (!person.abilities.createProject) {
    return (
      <div className="space-y-6">
        <PageHeading title="New project" />
        <EmptyState
          title="Projects are begun by designers"
          action={
            <Button asChild>
              <Link to="/projects">Projects</Link>
            </Button>
          }
        >
          Your role is {person.role}. Ask a designer to begin the project and to share it with you.
        </EmptyState>
      </div>
    );
  }
  return (
    <div className="space-y-8">
      <div>
        <PageHeading title="New project" />
        <p className="mt-1 text-ink-soft">Begin with a frame that is nearly yours.</p>
      </div>
      <BeginningChoice
        value={chosen?.id ?? ''}
        onChange={(id) => setParams({ from: id }, { replace: true, preventScrollReset: true })}
      />
      {starter && <StarterForm key={starter.id} starter={starter} />}
      {chosen?.id === 'import' && <ImportForm />}
      {chosen?.id === 'blank' && <BlankForm />}
    </div>
  );
}

interface BeginningChoiceProps {
  value: string;
  onChange: (id: Beginning['id']) => void;
}

function BeginningChoice({ value, onChange }: BeginningChoiceProps) {
  return (
    <fieldset>
      <legend className="mb-2 text-sm font-medium">Begin with</legend>
      <div className="grid gap-px border border-rule bg-rule sm:grid-cols-5">
        {BEGINNINGS.map((beginning) => (
          <label
            key={beginning.id}
            className="flex cursor-pointer gap-2 bg-ground p-3 has-checked:bg-sheet has-checked:shadow-[inset_0_3px_0_var(--ink)] has-focus-visible:outline-2 has-focus-visible:-outline-offset-2 has-focus-visible:outline-focus sm:flex-col"
          >
            <span className="flex items-center gap-2 font-medium">
              <input
                type="radio"
                name="from"
                value={beginning.id}
                checked={beginning.id === value}
                onChange={() => onChange(beginning.id)}
                className="size-4 accent-ink"
              />
              {beginning.name}
            </span>
            <span className="hidden text-sm text-ink-soft sm:block">{beginning.description}</span>
          </label>
        ))}
      </div>
    </fieldset>
  );
}
