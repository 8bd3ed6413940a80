import { tsImport } from 'tsx/esm/api';

/** The solver thread run from sources: packages that are modules only cannot be loaded the way tsx loads a worker. */
const worker = await tsImport('./solveWorker.ts', import.meta.url);

export default worker.default;
export const { warm } = worker;
