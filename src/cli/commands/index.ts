import { asBuilt } from './as-built.js';
import { catalogue } from './catalogue.js';
import { check } from './check.js';
import type { CliCommand } from './command.js';
import { compare } from './compare.js';
import { convert } from './convert.js';
import { exportTruss } from './export.js';
import { gauge } from './gauge.js';
import { make } from './make.js';
import { mend } from './mend.js';
import { nest } from './nest.js';
import { newJob } from './new.js';
import { size } from './size.js';
import { stock } from './stock.js';

/** The commands, in the order of the help. */
export const commands: readonly CliCommand[] = [
  newJob,
  make,
  check,
  gauge,
  nest,
  size,
  catalogue,
  mend,
  compare,
  asBuilt,
  convert,
  exportTruss,
  stock,
];
