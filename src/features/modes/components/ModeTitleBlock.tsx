import type { ProjectResponse } from '#shared/schemas/project.ts';
import type { SolveSummary } from '#shared/schemas/solveResult.ts';
import { TitleBlock } from '#src/components/TitleBlock.tsx';
import type { ShownFrame } from '#src/hooks/useShownFrame.ts';
import { useUnits } from '#src/hooks/useUnits.ts';

interface ModeTitleBlockProps {
  readonly project: ProjectResponse;
  readonly shown: ShownFrame;
  readonly summary: SolveSummary;
}

/** The drawing's title block, as it reads on the Modes sheet. */
export function ModeTitleBlock({ project, shown, summary }: ModeTitleBlockProps) {
  const units = useUnits();
  const { count } = summary;
  return (
    <TitleBlock
      rows={[
        ['Machine', project.machine === '' ? project.name : project.machine],
        ['Revision', shown.label],
        ['State', shown.state?.name ?? 'as drawn'],
        ['Mass', units.quantity(summary.totalMassKg, 'mass')],
        ['Mass kind', `${summary.method}, ${summary.freeDof.toLocaleString('en')} unknowns`],
        [
          'None missed',
          count.complete
            ? `${count.found} of ${count.below} below ${count.shiftHz.toFixed(1)} Hz`
            : `incomplete: ${count.found} of ${count.below}`,
        ],
      ]}
    />
  );
}
