import type { AssemblyStep, Entry, StrutEntry } from '../../model/assembly.js';
import type { Units } from '../kit/units.js';

const HOW: Readonly<Record<Entry, string>> = {
  loose: '',
  squeezed: 'push the loop together evenly',
  spread: 'bend aside and let spring in',
  detail: 'closing detail',
  blocked: 'cannot get in: needs a closing detail',
};

/** How a strut gets in, for the list of its step; nothing where it simply slides in. */
export function howItEnters(entry: StrutEntry): string {
  if (entry.detail) return `${entry.detail.kind === 'clamp' ? 'clamped' : entry.detail.kind} at ${entry.detail.node}`;
  return HOW[entry.entry];
}

/** What a step does, in one sentence. */
export function sayStep(step: AssemblyStep): string {
  const struts = step.struts.length === 1 ? 'one strut' : `${step.struts.length} struts`;
  if (step.kind === 'panel') return `Fix panel ${step.panels.join(', ')}.`;
  if (step.kind === 'unit') {
    if (step.struts.length === 0) return `Set hub ${step.hubs.join(', ')} in its place.`;
    return `Join hubs ${step.hubs.join(', ')} into a loop with ${struts}.`;
  }
  if (step.hubs.length === 0)
    return `Close strut ${step.struts.map((s) => s.strut).join(', ')} between hubs that stand.`;
  return `Put on hub ${step.hubs.join(', ')} with ${struts}.`;
}

/** What else to mind in a step: props, holds, reach, deflection. */
export function stepNotes(step: AssemblyStep, units: Units): string[] {
  const details = new Set(step.struts.map((s) => s.detail?.kind));
  return [
    ...(details.has('drop-in') ? ['Drop-in: lay the strut in from the open side, then put on the cap.'] : []),
    ...(details.has('slide')
      ? ['Slide: push the strut in past its place, draw it back into its far socket, and pin it.']
      : []),
    ...(details.has('clamp') ? ['Clamped: lay the strut into the half hub, then screw the other half on.'] : []),
    ...(step.props.length > 0 ? [`Prop ${step.props.join(', ')}.`] : []),
    ...(step.release.length > 0 ? [`Props under ${step.release.join(', ')} may go once this step holds.`] : []),
    ...(step.hold_min > 0 ? [`Hold still ${step.hold_min} minutes until the glue holds.`] : []),
    ...(step.access ? [] : ['A hand does not reach in here past the struts: use a tool, or build it on the bench.']),
    ...(step.unstable ? ['What stands can still move freely: hold it until more struts are in.'] : []),
    ...(step.deflection_mm !== null &&
    step.deflection_mm >= 0.1 &&
    units.length(step.deflection_mm, 1) !== units.length(0, 1)
      ? [`It sags by ${units.length(step.deflection_mm, 1)} ${units.lengthUnit} under its own weight.`]
      : []),
  ];
}
