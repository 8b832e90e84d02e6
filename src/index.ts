import { nestPanels as nest } from './planning/nesting/nestPanels.js';
import type { NestingAnswer, NestingRequest } from './planning/nesting/request.js';

export type { NestingAnswer, NestingRequest } from './planning/nesting/request.js';

/** Panels on sheets, with the caller's clock for `timeLimitMs`; see src/planning/nesting/nestPanels.ts. */
export const nestPanels = (request: NestingRequest): Promise<NestingAnswer> => nest(request, () => performance.now());
