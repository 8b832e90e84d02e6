import { type Fault, quoted } from './fault.js';
import type { JsonDocument } from './json-document.js';

/** A tube whose wall fills it, or more, has no section. */
export function checkSections(document: JsonDocument): Fault[] {
  const faults: Fault[] = [];
  const sections = (document.value as { sections?: unknown } | null)?.sections;
  if (typeof sections !== 'object' || sections === null) return faults;
  for (const [name, section] of Object.entries(sections)) {
    const shape = (section as { shape?: { kind?: unknown; diameter_mm?: unknown; wall_mm?: unknown } } | null)?.shape;
    if (shape?.kind !== 'tube') continue;
    const { diameter_mm: diameter, wall_mm: wall } = shape;
    if (typeof diameter !== 'number' || typeof wall !== 'number' || !(diameter > 0) || 2 * wall < diameter) continue;
    faults.push(
      document.fault(
        document.offset(['sections', name, 'shape', 'wall_mm']),
        `the wall of section ${quoted(name)} is half its diameter of ${diameter} mm or more`,
        `write less than ${diameter / 2}, or "kind": "round" for a solid bar`,
      ),
    );
  }
  return faults;
}
