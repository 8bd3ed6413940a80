import { z } from 'zod';
import { refineFrame } from '#shared/analysis/refineFrame.ts';
import type { KindRefinement, Refinement } from '#shared/analysis/refineFrame.ts';
import { parseDocument, readText } from './readDocument.ts';
import { readOptions, wholeNumber } from './readOptions.ts';
import type { Streams } from './Streams.ts';
import { significant, table } from './table.ts';

const DEFAULT_MODES = 12;
/** Exit codes of a refinement that gave a result. */
const COMPLETE = 0;
const INCOMPLETE = 2;

const optionValues = z.object({
  modes: wholeNumber(200).optional(),
  state: z.string().optional(),
  json: z.boolean().optional(),
});

/**
 * Solves the frame document in FILE (`-` = standard input) with every beam in 1, 2, 4, 8 and 16 elements, with both
 * mass kinds, and mesh-free, and prints how the frequencies converge; needs no database.
 */
export async function refine(args: string[], streams: Streams): Promise<number> {
  const { file, options } = readOptions(args, {
    usage: 'refine FILE [--modes N] [--state ID] [--json]',
    types: { modes: { type: 'string' }, state: { type: 'string' }, json: { type: 'boolean' } },
    values: optionValues,
  });
  const { document, warnings } = parseDocument(await readText(file, streams.input));
  const modes = options.modes ?? DEFAULT_MODES;
  const refinement = refineFrame({ document, stateId: options.state ?? null, modes }, undefined, {
    warnings,
  });
  streams.out(options.json ? `${JSON.stringify(refinement)}\n` : refinementTable(refinement));
  return refinement.complete ? COMPLETE : INCOMPLETE;
}

function refinementTable(refinement: Refinement): string {
  const { divisions, meshFreeHz, consistent, lumped, agreement, complete, warnings } = refinement;
  const kind = (title: string, { followedHz, order }: KindRefinement): string[] => [
    '',
    `${title} mass, Hz by elements of each beam`,
    ...table([
      ['mode', ...divisions.map(String), 'mesh-free', 'order'],
      ...meshFreeHz.map((exact, mode) => [
        String(mode + 1),
        ...(followedHz[mode] ?? []).map((value) => orDash(value, (hz) => significant(hz, 6))),
        significant(exact, 6),
        orDash(order[mode] ?? null, (p) => p.toFixed(1)),
      ]),
    ]),
  ];
  const percent = significant(100 * agreement.tolerance, 3);
  const lines = [
    ...kind('consistent', consistent).slice(1),
    ...kind('lumped', lumped),
    '',
    agreement.divisions === null
      ? `Consistent and lumped mass agree within ${percent} % at none of these.`
      : `Consistent and lumped mass agree within ${percent} % from ${agreement.divisions} ${agreement.divisions === 1 ? 'element' : 'elements'} of each beam: ` +
        'the mesh is fine enough. Theory, joints and supports may move the frequencies more than that.',
    ...(complete ? [] : ['INCOMPLETE: not every solve could be certified.']),
    ...warnings.map(({ path, message }) => `Warning: ${path === '' ? '' : `${path}: `}${message}`),
  ];
  return `${lines.join('\n')}\n`;
}

function orDash(value: number | null, text: (value: number) => string): string {
  return value === null ? '–' : text(value);
}
