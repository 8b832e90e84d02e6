import { nestPanels as nest } from './planning/nesting/nestPanels.js';
import type { NestingAnswer, NestingRequest } from './planning/nesting/request.js';
import { planStock as plan } from './planning/stock/planStock.js';
import type { StockAnswer, StockRequest } from './planning/stock/request.js';

export type { NestingAnswer, NestingRequest } from './planning/nesting/request.js';

/** Panels on sheets, with the caller's clock for `timeLimitMs`; see src/planning/nesting/nestPanels.ts. */
export const nestPanels = (request: NestingRequest): Promise<NestingAnswer> => nest(request, () => performance.now());

export type { StockAnswer, StockRequest } from './planning/stock/request.js';

/** Pieces cut from bars, with the caller's clock for `timeLimitMs`; see src/planning/stock/planStock.ts. */
export const planStock = (request: StockRequest): Promise<StockAnswer> => plan(request, () => performance.now());
