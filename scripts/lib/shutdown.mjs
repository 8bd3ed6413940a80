import { stopChildren } from './processes.mjs';

/**
 * What has to be stopped when the script ends, the last started first.
 * @type {{ stop: () => void | Promise<void>, name: string | undefined }[]}
 */
const running = [];

/** @type {Promise<void> | undefined} */
let stopping;

/**
 * @param {() => void | Promise<void>} stop
 * @param {string} [name] of what is stopped, to tell the person at the terminal
 */
export function onShutdown(stop, name) {
  running.push({ stop, name });
}

/**
 * Stops everything that was started, once however often it is called.
 *
 * @returns {Promise<void>}
 */
export function shutDown() {
  stopping ??= (async () => {
    await stopChildren();
    for (const { stop, name } of running.reverse()) {
      await stop();
      if (name !== undefined) console.log(`  Stopped ${name}`);
    }
  })();
  return stopping;
}

/** @returns {boolean} */
export function isShuttingDown() {
  return stopping !== undefined;
}

/**
 * Ctrl-C, SIGTERM and a closed terminal stop everything, then the script.
 *
 * @param {number} [status] exit status then: 0 where stopping is how the work ends
 */
export function shutDownOnSignals(status = 0) {
  for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
    process.on(signal, () => {
      if (!isShuttingDown()) console.log('\n  Stopping what was started');
      void shutDown().then(() => process.exit(status));
    });
  }
}
