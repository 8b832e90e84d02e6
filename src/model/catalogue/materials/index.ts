import type { Material } from '../../material.js';
import { ALUMINIUM } from './aluminium.js';
import { BOARDS } from './boards.js';
import { DOWELS } from './dowels.js';
import { EN_338 } from './en338.js';
import { EN_14080 } from './en14080.js';
import { NDS_LUMBER } from './nds.js';
import { PRINTED } from './printed.js';
import { SHEETS } from './sheets.js';
import { STEEL } from './steel.js';

/** Materials by name. A job adds its own under `materials`. */
export const MATERIALS: ReadonlyMap<string, Material> = new Map(
  [EN_338, EN_14080, DOWELS, NDS_LUMBER, STEEL, ALUMINIUM, PRINTED, SHEETS, BOARDS].flat().map((m) => [m.name, m]),
);
