import { parseArgs } from 'node:util';
import type { ParseArgsConfig } from 'node:util';
import { z } from 'zod';
import { AppError } from '#shared/errors/AppError.ts';
import type { Issue } from '#shared/errors/AppError.ts';

/** An option's text that must be a whole number from 1. */
export const wholeNumber = (most: number) =>
  z
    .string()
    .regex(/^\d+$/, 'takes a whole number.')
    .transform(Number)
    .pipe(z.int().min(1, 'takes at least 1.').max(most, `takes at most ${most}.`));

export interface OptionsForm<Options extends z.ZodType> {
  /** How the command is written, for refusals. */
  readonly usage: string;
  readonly types: NonNullable<ParseArgsConfig['options']>;
  readonly values: Options;
  /** What is wrong with the options together; null where nothing is. */
  readonly together?: (given: Readonly<Record<string, unknown>>) => string | null;
}

/**
 * The one file and the options of a command. Throws AppError `invalid-request` with everything that is wrong.
 */
export function readOptions<Options extends z.ZodType>(
  args: string[],
  { usage, types, values, together }: OptionsForm<Options>,
): { file: string; options: z.output<Options> } {
  const usageIssue = (message: string): Issue => ({
    path: '',
    message: `${message} Usage: ${usage}`,
  });
  let given: { values: Readonly<Record<string, unknown>>; positionals: string[] };
  try {
    given = parseArgs({ args, allowPositionals: true, options: types });
  } catch (cause) {
    const reason = cause instanceof Error ? cause.message : String(cause);
    throw new AppError('invalid-request', reason, { issues: [usageIssue(reason)] }, cause);
  }
  const issues: Issue[] = [];
  const [file, ...extra] = given.positionals;
  if (file === undefined) {
    issues.push(usageIssue('Name the file of a frame document, or - for standard input.'));
  }
  if (extra.length > 0) {
    issues.push(usageIssue(`One file at a time: ${extra.join(', ')} is too much.`));
  }
  const wrong = together?.(given.values) ?? null;
  if (wrong !== null) issues.push(usageIssue(wrong));
  const parsed = values.safeParse(given.values);
  for (const { path, message } of parsed.error?.issues ?? []) {
    issues.push({ path: `--${path.join('.')}`, message: `--${path.join('.')} ${message}` });
  }
  if (file === undefined || !parsed.success || issues.length > 0) {
    throw new AppError('invalid-request', 'The command is not complete.', { issues });
  }
  return { file, options: parsed.data };
}
