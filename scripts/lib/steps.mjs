/** A failure that says in one line what the person at the terminal can do about it. */
export class StepError extends Error {
  /**
   * @param {string} message what is wrong and what to do, on one line
   * @param {{ cause?: unknown }} [options]
   */
  constructor(message, options) {
    super(message, options);
    this.name = 'StepError';
  }
}

/**
 * @param {number} ms
 * @returns {string} such as `0.4 s` or `2 min 5 s`
 */
export function formatDuration(ms) {
  if (ms < 59_950) return `${(ms / 1000).toFixed(1)} s`;
  const seconds = Math.round(ms / 1000);
  return `${Math.floor(seconds / 60)} min ${seconds % 60} s`;
}

/**
 * Runs one step of the set-up; prints what it does, what came of it and how long it took.
 *
 * @template T
 * @param {string} title in the infinitive, such as `Start PostgreSQL`
 * @param {(note: (text: string) => void) => T | Promise<T>} work `note` says what came of it
 * @returns {Promise<T>}
 */
export async function step(title, work) {
  const began = performance.now();
  let outcome = '';
  const result = await work((text) => {
    outcome = `: ${text}`;
  });
  console.log(`  ${title}${outcome} (${formatDuration(performance.now() - began)})`);
  return result;
}

/**
 * Prints a failure as one line and gives the exit status.
 *
 * @param {unknown} error
 * @returns {1}
 */
export function reportFailure(error) {
  if (error instanceof StepError) console.error(`  Stopped. ${error.message}`);
  else console.error(error);
  return 1;
}
