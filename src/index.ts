/** The library: the same functions that the commands use, without the file system. */
import { type NestingHelp, nestPanels as nest } from './planning/nesting/nest-panels.js';
import type { NestingAnswer, NestingRequest } from './planning/nesting/request.js';
import { planStock as plan } from './planning/stock/plan-stock.js';
import type { StockAnswer, StockRequest } from './planning/stock/request.js';

export type { CheckReport } from './documents/check-json.js';
export type { Job } from './model/job/index.js';
export type { Truss } from './model/truss.js';
export { check } from './pipeline/check.js';
export type { NestingAnswer, NestingRequest } from './planning/nesting/request.js';
export type { StockAnswer, StockRequest } from './planning/stock/request.js';
export type { Fault } from './readers/fault.js';
export { readJob } from './readers/job.js';
export { readTruss } from './readers/truss.js';

/**
 * Panels on sheets, with the caller's clock for `timeLimitMs`; see src/planning/nesting/nest-panels.ts. `each`: a worker pool's, as
 * makePack takes it; absent: everything runs in this thread, with the same result.
 */
export const nestPanels = (request: NestingRequest, options?: Pick<NestingHelp, 'each'>): Promise<NestingAnswer> =>
  nest(request, { clock: Date.now, ...options });

/** Pieces cut from bars, with the caller's clock for `timeLimitMs`; see src/planning/stock/plan-stock.ts. */
export const planStock = (request: StockRequest): Promise<StockAnswer> => plan(request, () => performance.now());
