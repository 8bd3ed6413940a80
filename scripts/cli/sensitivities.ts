import { z } from 'zod';
import type { Sensitivity } from '#shared/analysis/sensitivity/sensitivities.ts';
import { solveSensitivities } from '#shared/analysis/sensitivity/solveSensitivities.ts';
import { AppError } from '#shared/errors/AppError.ts';
import { parseDocument, readText } from './readDocument.ts';
import { readOptions, wholeNumber } from './readOptions.ts';
import type { Streams } from './Streams.ts';
import { significant, table } from './table.ts';

/** Exit codes of sensitivities that were found. */
const COMPLETE = 0;
const INCOMPLETE = 2;
const MOST_SHOWN = 25;

const optionValues = z.object({
  mode: wholeNumber(200).optional(),
  method: z.enum(['consistent', 'lumped'], 'takes consistent or lumped.').optional(),
  state: z.string().optional(),
  json: z.boolean().optional(),
});

/**
 * Ranks what moves one mode of the frame document in FILE (`-` = standard input): how much its frequency changes with
 * every number of the frame; needs no database.
 */
export async function sensitivities(args: string[], streams: Streams): Promise<number> {
  const { file, options } = readOptions(args, {
    usage: 'sensitivities FILE --mode N [--method consistent|lumped] [--state ID] [--json]',
    types: {
      mode: { type: 'string' },
      method: { type: 'string' },
      state: { type: 'string' },
      json: { type: 'boolean' },
    },
    values: optionValues,
    together: (given) => (given['mode'] === undefined ? 'Say which mode, with --mode.' : null),
  });
  const { document } = parseDocument(await readText(file, streams.input));
  const { mode = 1, method = 'consistent', state = null } = options;
  const found = solveSensitivities({ document, method, stateId: state, settings: { modes: mode } });
  const place = found.modes.indexOf(mode);
  const frequencyHz = found.frequenciesHz[place];
  if (frequencyHz === undefined) {
    throw new AppError(
      'invalid-request',
      `Mode ${mode} is a rigid-body mode or does not exist: nothing changes its frequency. ` +
        `Modes with sensitivities: ${found.modes.join(', ') || 'none'}.`,
    );
  }
  const ranked = found.parameters
    .map((parameter) => effectOf(parameter, place))
    .sort((a, b) => Math.abs(b.changeHz) - Math.abs(a.changeHz));
  if (options.json) {
    const { complete, repeated } = found;
    const answer = { mode, frequencyHz, repeated: repeated[place], complete, parameters: ranked };
    streams.out(`${JSON.stringify(answer)}\n`);
  } else {
    const lines = [
      `mode ${mode}, ${significant(frequencyHz, 6)} Hz, ${method} mass`,
      ...(found.repeated[place]
        ? [
            'It shares its frequency with others: the changes are those of the frequencies that they part into.',
          ]
        : []),
      '',
      ...table([
        ['what', 'now', 'step', 'Hz'],
        ...ranked
          .slice(0, MOST_SHOWN)
          .map(({ list, id, field, value, step, changeHz }) => [
            `${list} ${id} ${field}`,
            significant(value, 4),
            step,
            `${changeHz < 0 ? '' : '+'}${significant(changeHz, 3)}`,
          ]),
      ]),
      '',
      `The change that a small step makes, SI units; ${ranked.length} numbers in all. A large step: solve it.`,
      ...(found.complete ? [] : ['INCOMPLETE: the solve could not be certified.']),
    ];
    streams.out(`${lines.join('\n')}\n`);
  }
  return found.complete ? COMPLETE : INCOMPLETE;
}

/** Steps that are alike to a designer: a hundredth of a property, ten millimetres of a place. */
const MOVE = 0.01;
const SHARE = 0.01;

function effectOf({ perUnit, ...parameter }: Sensitivity, place: number) {
  const { list, field, value } = parameter;
  const isPlace = list === 'nodes' || field.startsWith('offset.');
  const slope = perUnit[place] ?? 0;
  const step = isPlace ? MOVE : SHARE * Math.abs(value);
  return {
    ...parameter,
    perUnit: slope,
    step: isPlace ? '+10 mm' : '+1 %',
    changeHz: slope * step,
  };
}
