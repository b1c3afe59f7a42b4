import { startAudit, unaudited } from '../../sim/auditor/index.js';
import { startRun, unsupported } from '../../sim/stepper/index.js';
import type { Solvers } from './run-both.js';

/** The solvers of the program. */
export const solvers: Solvers = { stepper: { unsupported, startRun }, auditor: { unaudited, startAudit } };
