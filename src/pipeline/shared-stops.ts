import type { Assessment } from '../documents/records.js';
import type { StrutPart } from '../model/parts.js';
import { planFitUp } from '../planning/fit-up/plan-fit-up.js';
import { type StopCandidate, shareStops } from '../planning/stock/share-stops.js';

/**
 * The assessment with nearly equal cut lengths brought to one stop setting, section by section, where the job asks for it.
 * A strut gives half of the play that the fit-up leaves it, either way, and no end more than its float; half, because
 * errors use the play from its middle. Struts whose ends are drilled, or whose fit-up is unknown, keep their lengths.
 */
export function withSharedStops(assessed: Assessment): Assessment {
  const { job, parts, topology } = assessed;
  if (!job.struts.shareStops || job.struts.pinDrill) return assessed;
  const fitUp = planFitUp(topology, parts, job);
  if (!fitUp) return assessed;
  const give = new Map(fitUp.struts.map((s) => [s.mark, (Math.max(0, 1 - s.share) * s.play_mm) / 2]));
  const sections = new Map<string, StopCandidate[]>();
  for (const { mark, section, cutLength, ends } of parts.struts) {
    if (cutLength === null || !section) continue;
    const least = Math.min(ends[0].float ?? 0, ends[1].float ?? 0);
    const candidate = { mark, length: cutLength, give: Math.min(give.get(mark) ?? 0, 2 * least) };
    const group = sections.get(section.name);
    if (group) group.push(candidate);
    else sections.set(section.name, [candidate]);
  }
  const shared = new Map(
    [...sections.values()].flatMap((group) => shareStops(group, job.saw.step_mm)).map((s) => [s.mark, s]),
  );
  const struts = parts.struts.map((strut): StrutPart => {
    const stop = shared.get(strut.mark);
    if (!stop || strut.cutLength === null) return strut;
    const ends = strut.ends.map((end) => ({
      ...end,
      float: end.float === null ? null : end.float - stop.misfit / 2,
    })) as unknown as StrutPart['ends'];
    return {
      ...strut,
      ends,
      cutLength: stop.setting,
      mass: strut.mass === null ? null : (strut.mass * stop.setting) / strut.cutLength,
      misfit: stop.misfit,
    };
  });
  return { ...assessed, parts: { ...parts, struts } };
}
