import { ballRadius } from '../../detailing/systems/drilled-ball.js';
import { hubShape } from '../../detailing/systems/hub-shape.js';
import type { Job } from '../../model/job/index.js';
import type { HubPart } from '../../model/parts.js';
import { CAUTION } from '../cautions.js';
import { issueOf } from '../issue.js';
import { drawCheckBars } from '../kit/check-bars.js';
import type { Fonts } from '../kit/fonts.js';
import type { Area, Point } from '../kit/geometry2.js';
import { INK, LINE, SIZE } from '../kit/ink.js';
import { Paper, type Written } from '../kit/paper.js';
import { capHeight } from '../kit/pen.js';
import { fixed, unitsOf } from '../kit/units.js';
import { byMark } from '../member-rows.js';
import type { PackRecords } from '../records.js';
import { cubeTemplate } from './cube-template.js';
import { starRays } from './star-rays.js';
import { boxRound, drawCentre, note, ROUND, sizeOf, type Template, title, WORDS } from './template.js';

/** Width of a paper strip, mm. */
const STRIP = 9;
/** Left and below for the 100 mm bars, mm. */
const BARS = 8;

/**
 * drilling-templates.pdf: at full size, a star of paper strips for each drilled ball, the unfolded faces of each drilled cube and the anchors of each foot. Those that are larger
 * than the sheet are left out. null: nothing is drilled, or nothing fits.
 */
export async function drillingTemplates(records: PackRecords, fonts: Fonts): Promise<Written | null> {
  const { job } = records;
  const hubs = [...records.parts.hubs].filter((h) => h.makeable).sort((a, b) => byMark(a.mark, b.mark));
  const templates = hubs.flatMap((hub) => templateOf(hub, job) ?? []);
  if (templates.length === 0) return null;
  const paper = new Paper(issueOf(records, fonts), 'Drilling templates', CAUTION, unitsOf(job, 0).words);
  const words = Object.entries(WORDS_FOR).flatMap(([system, said]) =>
    hubs.some((h) => h.system === system) ? said : [],
  );
  const sheet = (): Area => {
    const area = paper.addSheet({
      title: 'Drilling templates',
      instruction: `Full size: print at 100 % and measure both bars first. ${words.join(' ')}`,
    });
    drawCheckBars(paper.pen, area.x, area.y + area.height);
    return { x: area.x + BARS, y: area.y, width: area.width - BARS, height: area.height - BARS };
  };
  let area: Area | null = null;
  let [x, y, row] = [0, 0, 0];
  let drawn = 0;
  const queue = [...templates];
  for (let t = queue.shift(); t; t = queue.shift()) {
    if (!area) {
      area = sheet();
      [x, y, row] = [area.x, area.y, 0];
    }
    if (t.width > area.width || t.height > area.height) {
      queue.unshift(...(t.parts ?? []));
      continue;
    }
    if (x + t.width > area.x + area.width) [x, y, row] = [area.x, y + row, 0];
    if (y + t.height > area.y + area.height) {
      area = sheet();
      [x, y, row] = [area.x, area.y, 0];
    }
    t.draw(paper.pen, x, y);
    x += t.width;
    row = Math.max(row, t.height);
    drawn++;
  }
  return drawn > 0 ? paper.finish() : null;
}

/** What to do with the template of each system. */
const WORDS_FOR = {
  'drilled-ball':
    'Ball: cut out the star, pin its middle where the first bore goes, lay the strips over the ball; each cross is the middle of a bore.',
  'drilled-cube':
    'Cube: cut out, lay each face on the side that it names, z up; each cross is the middle of a bore, the drill leans along its arrow.',
  foot: 'Foot: lay it on the ground or board, its arrow along the truss’s x, and prick the anchors through.',
} as const;

function templateOf(hub: HubPart, job: Job): Template | null {
  if (hub.system === 'drilled-ball') return starOf(hub);
  if (hub.system === 'drilled-cube') return cubeTemplate(hub);
  return hub.system === 'foot' ? anchorsOf(hub, job) : null;
}

/** The star of strips of a ball, its middle on the first bore. */
function starOf(hub: HubPart): Template | null {
  const radius = ballRadius(hub);
  const rays = starRays(hub);
  const first = hub.sockets[0];
  if (!first || rays.length === 0) return null;
  // y runs down the sheet; anticlockwise stays anticlockwise as it is looked at.
  const tips = rays.map(({ length, angle }): Point => [length * Math.cos(angle), -length * Math.sin(angle)]);
  const box = boxRound(
    [[0, 0], ...tips],
    STRIP / 2 + ROUND + Math.max(...hub.sockets.map((s) => s.bore as number)) / 2,
  );
  return {
    ...sizeOf(box),
    draw(pen, x, y) {
      const [cx, cy] = [x - box.left, y + WORDS.over - box.top];
      for (const { length, angle, bore } of rays) {
        const [c, s] = [Math.cos(angle), -Math.sin(angle)];
        const at = (along: number, off: number): Point => [cx + c * along - s * off, cy + s * along + c * off];
        const end = length + bore / 2 + 2;
        const half = STRIP / 2;
        pen.polyline([at(0, -half), at(end, -half), at(end, half), at(0, half)], {
          width: LINE.thin,
          colour: INK.grey,
        });
        pen.line(at(0, 0), at(length, 0), { width: LINE.hair });
      }
      rays.forEach(({ strut, bore, angle, length }, i) => {
        const [tx, ty] = [cx + tips[i]![0], cy + tips[i]![1]];
        drawCentre(pen, tx, ty, bore / 2);
        // The mark lies across its strip, inside the bore's rim, away from the middle's own.
        const back = Math.min(length * 0.5, bore / 2 + 4);
        const [mx, my] = [tx - back * Math.cos(angle), ty + back * Math.sin(angle)];
        pen.blot({ x: mx, y: my, width: pen.widthOf(strut, BOLD) + 1, height: 3.2, angle: 0 });
        pen.text(strut, mx, my + capHeight(SIZE.note) / 2, { ...BOLD, align: 'centre' });
      });
      pen.circle(cx, cy, (first.bore as number) / 2, { fill: INK.white });
      drawCentre(pen, cx, cy, (first.bore as number) / 2);
      title(pen, hub.mark, `first bore ${first.strut}, ball Ø ${fixed(2 * radius, 0)} mm`, x, y, box);
      const bores = [...new Set(hub.sockets.map((s) => `Ø ${fixed(s.bore as number, 1)}, ${fixed(s.depth, 1)} deep`))];
      note(pen, bores.join('; '), x, y, box);
    },
  };
}

const BOLD = { size: SIZE.note, bold: true } as const;

/** A foot's plate with its anchors and levelling screw, from above, in the truss's axes. */
function anchorsOf(hub: HubPart, job: Job): Template | null {
  const base = hubShape(hub, job).base;
  if (!base || (base.anchors.count === 0 && base.levelling === 0)) return null;
  const { count, circle, diameter, turn } = base.anchors;
  const box = boxRound([[0, 0]], base.radius + ROUND);
  return {
    ...sizeOf(box),
    draw(pen, x, y) {
      const [cx, cy] = [x - box.left, y + WORDS.over - box.top];
      pen.circle(cx, cy, base.radius, { width: LINE.normal });
      pen.circle(cx, cy, circle, { width: LINE.hair, colour: INK.grey });
      for (let k = 0; k < count; k++) {
        const a = turn + (2 * Math.PI * k) / count;
        drawCentre(pen, cx + circle * Math.cos(a), cy - circle * Math.sin(a), diameter / 2);
      }
      drawCentre(pen, cx, cy, base.levelling / 2);
      const tip = base.radius - 2;
      pen.line([cx + base.radius * 0.35, cy], [cx + tip, cy], { width: LINE.normal });
      pen.polygon(
        [
          [cx + tip, cy],
          [cx + tip - 3, cy - 1.2],
          [cx + tip - 3, cy + 1.2],
        ],
        INK.black,
      );
      pen.text('x', cx + base.radius * 0.6, cy - 1.5, { size: SIZE.note, align: 'centre' });
      title(pen, hub.mark, `foot, plate Ø ${fixed(2 * base.radius, 0)} mm`, x, y, box);
      const level = base.levelling > 0 ? `, levelling screw Ø ${fixed(base.levelling, 1)} in the middle` : '';
      note(pen, `${count} anchors Ø ${fixed(diameter, 1)} on a circle Ø ${fixed(2 * circle, 1)}${level}`, x, y, box);
    },
  };
}
