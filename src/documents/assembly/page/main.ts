import type { PageData } from './data.js';
import { details, element, markOf } from './details.js';
import { drawLabels } from './labels.js';
import { copyPicture } from './printed.js';
import { type Inks, type Look, makeView, type PartRef } from './scene.js';
import { openStore } from './store.js';

const data = JSON.parse(document.getElementById('pack')!.textContent!) as PageData;
const store = openStore(data.key);
const find = <T extends HTMLElement>(id: string): T => document.getElementById(id) as T;

const lastStep = Math.max(0, data.steps.length - 1);
let step = Math.min(Math.max(0, store.step()), lastStep);
let picked: PartRef | null = null;
let labels = true;
let forces = false;
let playing = 0;
let waiting = false;
let room = { right: 0, bottom: 0 };

const view = makeView(data, find<HTMLCanvasElement>('truss'), redraw);
document.body.classList.toggle('flat', view === null);

/** Step in which each part comes; parts of no step come with the last. */
const stepOf = {
  node: data.nodes.map((_, i) => firstStep((s) => s.nodes.includes(i))),
  strut: data.struts.map((_, i) => firstStep((s) => s.struts.some((e) => e.index === i))),
  panel: data.panels.map((_, i) => firstStep((s) => s.panels.includes(i))),
};

function firstStep(has: (s: PageData['steps'][number]) => boolean): number {
  const at = data.steps.findIndex(has);
  return at < 0 ? lastStep : at;
}

function looks(): { nodes: Look[]; struts: Look[]; panels: Look[]; propped: readonly number[] } {
  const of = (kind: PartRef['kind']): Look[] =>
    stepOf[kind].map((s, i) => {
      if (picked?.kind === kind && picked.index === i) return 'picked';
      return s > step ? 'absent' : s === step ? 'new' : 'earlier';
    });
  return { nodes: of('node'), struts: of('strut'), panels: of('panel'), propped: data.steps[step]?.propped ?? [] };
}

function inks(): Inks {
  const css = getComputedStyle(document.documentElement);
  const v = (name: string): string => css.getPropertyValue(`--${name}`).trim();
  return {
    ground: v('ground'),
    earlier: v('earlier'),
    fresh: v('ink'),
    picked: v('picked'),
    tension: v('tension'),
    compression: v('compression'),
    idle: v('earlier'),
    panel: v('panel'),
    prop: v('prop'),
  };
}

/** Draws once a frame however often it is asked. */
function redraw(): void {
  if (!view || waiting) return;
  waiting = true;
  requestAnimationFrame(() => {
    waiting = false;
    paint();
  });
}

function paint(): void {
  if (!view) return;
  view.draw();
  const ink = inks();
  const canvas = find<HTMLCanvasElement>('marks');
  const style = { ink: ink.fresh, faint: ink.prop, ground: ink.ground, all: labels, forces };
  if (labels || picked) drawLabels(canvas, view, data, looks(), style);
  else canvas.getContext('2d')?.clearRect(0, 0, canvas.width, canvas.height);
}

function show(): void {
  view?.show(looks(), forces);
  redraw();
}

function goTo(next: number): void {
  step = Math.min(Math.max(0, next), lastStep);
  store.keepStep(step);
  fillCard();
  // The step's sentence first; but the slider stays under the finger that moves it.
  if (document.activeElement !== find('slider')) find('card').scrollTop = 0;
  show();
}

function fillCard(): void {
  const s = data.steps[step];
  find('count').textContent = data.steps.length > 0 ? `Step ${step + 1} of ${data.steps.length}` : 'No steps';
  find('say').textContent = s?.say ?? '';
  find('notes').replaceChildren(...(s?.notes ?? []).map((n) => element('li', n)));
  find('parts').replaceChildren(...partRows());
  const next = data.steps[step + 1];
  find('next-say').textContent = next ? `Then: ${next.say}` : 'This is the last step.';
  find<HTMLButtonElement>('back').disabled = step === 0;
  find<HTMLButtonElement>('next').disabled = step >= lastStep;
  const slider = find<HTMLInputElement>('slider');
  slider.value = String(step + 1);
  slider.setAttribute('aria-valuetext', `step ${step + 1}: ${s?.say ?? ''}`);
  progress();
}

function partRows(): HTMLElement[] {
  const s = data.steps[step];
  if (!s) return [];
  return [
    ...s.nodes.map((i) => partRow({ kind: 'node', index: i }, `hub of ${data.nodes[i]!.sockets} sockets`)),
    ...s.struts.map(({ index, how }) => {
      const strut = data.struts[index]!;
      const [a, b] = strut.ends.map((n) => data.nodes[n]!.mark);
      return partRow({ kind: 'strut', index }, `${a} to ${b}, ${strut.cut}${how ? `; ${how}` : ''}`);
    }),
    ...s.panels.map((i) => partRow({ kind: 'panel', index: i }, data.panels[i]!.words)),
  ];
}

function partRow(part: PartRef, words: string): HTMLElement {
  const mark = markOf(data, part);
  const row = element('li');
  const label = element('label', '', 'tick');
  const box = document.createElement('input');
  box.type = 'checkbox';
  box.checked = store.isTicked(`${part.kind} ${mark}`);
  box.addEventListener('change', () => {
    store.tick(`${part.kind} ${mark}`, box.checked);
    progress();
  });
  label.append(box, element('b', mark, `mark ${part.kind}`), element('span', words));
  const more = element('button', 'Look', 'small');
  more.setAttribute('aria-label', `Look at ${part.kind} ${mark}`);
  more.addEventListener('click', () => pick(part));
  row.append(label, more);
  return row;
}

function progress(): void {
  const total = data.nodes.length + data.struts.length + data.panels.length;
  const ticked =
    data.nodes.filter((n) => store.isTicked(`node ${n.mark}`)).length +
    data.struts.filter((s) => store.isTicked(`strut ${s.mark}`)).length +
    data.panels.filter((p) => store.isTicked(`panel ${p.mark}`)).length;
  find('ticked').textContent = `${ticked} of ${total} parts ticked`;
}

function pick(part: PartRef | null): void {
  picked = part;
  const box = find('picked');
  box.hidden = part === null;
  if (part) {
    if (stepOf[part.kind][part.index]! > step) goTo(stepOf[part.kind][part.index]!);
    box.replaceChildren(...details(data, part, stepOf[part.kind][part.index]!, () => pick(null)));
    box.scrollIntoView({ block: 'nearest' });
  }
  show();
}

function search(text: string): void {
  const wanted = text.trim().toLowerCase();
  const answer = find('search-answer');
  if (!wanted) {
    answer.textContent = '';
    pick(null);
    return;
  }
  for (const [kind, list] of [
    ['node', data.nodes],
    ['strut', data.struts],
    ['panel', data.panels],
  ] as const) {
    const index = list.findIndex((p) => p.mark.toLowerCase() === wanted);
    if (index < 0) continue;
    answer.textContent = '';
    goTo(stepOf[kind][index]!);
    pick({ kind, index });
    return;
  }
  answer.textContent = 'No part has this mark.';
}

function play(on: boolean): void {
  window.clearInterval(playing);
  playing = 0;
  const button = find<HTMLButtonElement>('play');
  button.textContent = on ? 'Stop' : 'Play';
  button.setAttribute('aria-pressed', String(on));
  if (!on) return;
  if (step >= lastStep) goTo(0);
  playing = window.setInterval(() => {
    if (step >= lastStep) play(false);
    else goTo(step + 1);
  }, 1400);
}

function toggle(id: string, on: () => boolean, set: (on: boolean) => void): void {
  const button = find<HTMLButtonElement>(id);
  button.addEventListener('click', () => {
    set(!on());
    button.setAttribute('aria-pressed', String(on()));
    show();
  });
}

function resize(): void {
  // What a print lays out anew is laid out as before when it is done.
  if (!view || document.documentElement.classList.contains('paper')) return;
  const stage = find('stage').getBoundingClientRect();
  const card = find('card').getBoundingClientRect();
  const beside = card.left > stage.left + stage.width * 0.3;
  room = {
    right: beside ? stage.right - card.left : 0,
    bottom: beside ? 0 : Math.max(0, stage.bottom - card.top),
  };
  view.resize(stage.width, stage.height, room);
  redraw();
}

/** Puts the picture on paper in the inks of paper, or goes back to the screen. */
function onPaper(on: boolean): void {
  document.documentElement.classList.toggle('paper', on);
  if (!view) return;
  view.setInks(inks());
  if (on) {
    paint();
    copyPicture([view.canvas, find<HTMLCanvasElement>('marks')], room, find<HTMLCanvasElement>('printed'));
  } else resize();
}

find('back').addEventListener('click', () => goTo(step - 1));
find('next').addEventListener('click', () => goTo(step + 1));
find('play').addEventListener('click', () => play(playing === 0));
find('home').addEventListener('click', () => view?.look());
find('print').addEventListener('click', () => window.print());
const slider = find<HTMLInputElement>('slider');
slider.max = String(Math.max(1, data.steps.length));
slider.addEventListener('input', () => goTo(Number(slider.value) - 1));
toggle(
  'labels',
  () => labels,
  (on) => {
    labels = on;
  },
);
toggle(
  'forces',
  () => forces,
  (on) => {
    forces = on;
    find('legend').hidden = !on;
  },
);
toggle(
  'findings',
  () => !find('found').hidden,
  (on) => {
    find('found').hidden = !on;
  },
);
find('search').addEventListener('submit', (event) => {
  event.preventDefault();
  search(find<HTMLInputElement>('mark').value);
});
document.addEventListener('keydown', (event) => {
  const target = event.target as HTMLElement;
  if (event.altKey || event.ctrlKey || event.metaKey || target.matches('input[type=search], input[type=range]')) return;
  if (event.key === 'ArrowRight' || event.key === 'PageDown') goTo(step + 1);
  else if (event.key === 'ArrowLeft' || event.key === 'PageUp') goTo(step - 1);
  else if (event.key === 'Escape') pick(null);
  else if (event.key === '/') find('mark').focus();
  else return;
  event.preventDefault();
});
const canvas = find<HTMLCanvasElement>('truss');
canvas.addEventListener('keydown', (event) => {
  const turn = 0.12;
  const by: Record<string, [number, number]> = { a: [-turn, 0], d: [turn, 0], w: [0, -turn], s: [0, turn] };
  const move = by[event.key.toLowerCase()];
  if (move) view?.turn(...move);
});
let down: [number, number] | null = null;
canvas.addEventListener('pointerdown', (event) => {
  down = [event.offsetX, event.offsetY];
});
canvas.addEventListener('pointerup', (event) => {
  if (down && Math.hypot(event.offsetX - down[0], event.offsetY - down[1]) < 5)
    pick(view?.pick(event.offsetX, event.offsetY) ?? null);
  down = null;
});
window.addEventListener('resize', resize);
new ResizeObserver(resize).observe(find('card'));
matchMedia('(prefers-color-scheme: dark)').addEventListener('change', () => {
  view?.setInks(inks());
  redraw();
});
window.addEventListener('beforeprint', () => onPaper(true));
window.addEventListener('afterprint', () => onPaper(false));

view?.setInks(inks());
fillCard();
resize();
show();
document.body.dataset['ready'] = 'true';
