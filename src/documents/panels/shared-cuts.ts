import type { DrawingLine } from '../kit/drawing.js';
import { type Span, straightSides, withoutSpans } from './without-spans.js';

/**
 * Cuts with every straight part that two of them share drawn once, and nothing drawn along the gaps: closed outlines of which nothing is left
 * out stay closed, the others come apart into open lines. Panels must stand one kerf apart for their paths to meet.
 */
export function sharedCuts(lines: readonly DrawingLine[], gaps: readonly Span[] = []): DrawingLine[] {
  const drawn: Span[] = [...gaps];
  return lines.flatMap((line) => {
    const left = withoutSpans(line, drawn);
    drawn.push(...straightSides(line));
    return left;
  });
}
