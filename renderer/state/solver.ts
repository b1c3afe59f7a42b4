import { connect, webPort, type Client, type SolverMethods } from '../../sim/protocol/index.js';

/** A thread that reads and runs mechanisms. */
export interface Solver {
  client: Client<SolverMethods>;
  stop(): void;
}

export function startSolver(): Solver {
  const worker = new Worker(new URL('../../sim/worker.ts', import.meta.url), { type: 'module' });
  return { client: connect<SolverMethods>(webPort(worker)), stop: () => worker.terminate() };
}
