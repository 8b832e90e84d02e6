import type { Fault } from './fault.js';
import type { JsonDocument } from './json-document.js';
import { items, textOf } from './loose.js';

/** A job whose printers all print by another process than its hubs' has none for them. */
export function checkPrinters(document: JsonDocument): Fault[] {
  const job = document.value as { nodes?: unknown } | null;
  const wanted = textOf(job?.nodes, 'process') ?? 'filament';
  const processes = items(job, 'printers').map((p) => textOf(p, 'process') ?? wanted);
  if (processes.length === 0 || processes.includes(wanted)) return [];
  return [
    document.fault(
      document.offset(['printers']),
      `no printer prints by ${wanted}, the process of the hubs`,
      'add one, or name another process under "nodes"',
    ),
  ];
}
