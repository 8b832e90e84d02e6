import type { PageData } from './data.js';
import type { Look, View } from './scene.js';

/**
 * Marks beside their parts on a plain canvas over the picture: nodes in circles, struts on a break in the ground's colour
 * along their middle, panels underlined. A mark that would touch another is left out, new parts first.
 */
export function drawLabels(
  canvas: HTMLCanvasElement,
  view: View,
  data: PageData,
  looks: { readonly nodes: readonly Look[]; readonly struts: readonly Look[]; readonly panels: readonly Look[] },
  style: {
    readonly ink: string;
    readonly faint: string;
    readonly ground: string;
    readonly all: boolean;
    readonly forces: boolean;
  },
): void {
  const ratio = Math.min(2, devicePixelRatio);
  const [w, h] = [view.canvas.clientWidth, view.canvas.clientHeight];
  if (canvas.width !== Math.round(w * ratio)) canvas.width = Math.round(w * ratio);
  if (canvas.height !== Math.round(h * ratio)) canvas.height = Math.round(h * ratio);
  const pen = canvas.getContext('2d');
  if (!pen) return;
  pen.setTransform(ratio, 0, 0, ratio, 0, 0);
  pen.clearRect(0, 0, w, h);
  pen.textAlign = 'center';
  pen.textBaseline = 'middle';
  const taken: [number, number, number, number][] = [];
  const rank: Record<Look, number> = { picked: 3, new: 2, earlier: 1, absent: 0 };
  const wanted: { text: string; at: readonly [number, number]; kind: 'node' | 'strut' | 'panel'; look: Look }[] = [];
  const shown = (look: Look): boolean => look === 'picked' || look === 'new' || (style.all && look === 'earlier');
  data.nodes.forEach((n, i) => {
    if (shown(looks.nodes[i]!))
      wanted.push({ text: n.mark, at: view.project(n.at), kind: 'node', look: looks.nodes[i]! });
  });
  data.struts.forEach((s, i) => {
    if (!shown(looks.struts[i]!)) return;
    const [a, b] = [data.nodes[s.ends[0]]!.at, data.nodes[s.ends[1]]!.at];
    const middle = [0, 1, 2].map((k) => (a[k]! + b[k]!) / 2) as [number, number, number];
    const text = style.forces && s.forceText ? `${s.mark} ${s.forceText}` : s.mark;
    wanted.push({ text, at: view.project(middle), kind: 'strut', look: looks.struts[i]! });
  });
  data.panels.forEach((p, i) => {
    if (!shown(looks.panels[i]!) || p.corners.length === 0) return;
    const n = p.corners.length;
    const middle = [0, 1, 2].map((k) => p.corners.reduce((sum, c) => sum + c[k]!, 0) / n) as [number, number, number];
    wanted.push({ text: p.mark, at: view.project(middle), kind: 'panel', look: looks.panels[i]! });
  });
  wanted.sort((a, b) => rank[b.look] - rank[a.look] || (a.kind === 'node' ? 0 : 1) - (b.kind === 'node' ? 0 : 1));
  for (const label of wanted) {
    const strong = label.look !== 'earlier';
    pen.font = `${strong ? 700 : 400} ${strong ? 15 : 13}px system-ui, sans-serif`;
    const wide = pen.measureText(label.text).width + (label.kind === 'node' ? 12 : 8);
    const tall = strong ? 22 : 18;
    const [x, y] = label.at;
    const box: [number, number, number, number] = [x - wide / 2, y - tall / 2, x + wide / 2, y + tall / 2];
    if (box[0] < 0 || box[1] < 0 || box[2] > w || box[3] > h) continue;
    if (taken.some((t) => box[0] < t[2] && t[0] < box[2] && box[1] < t[3] && t[1] < box[3])) continue;
    taken.push(box);
    const ink = strong ? style.ink : style.faint;
    pen.fillStyle = style.ground;
    pen.strokeStyle = ink;
    pen.lineWidth = strong ? 1.5 : 1;
    pen.beginPath();
    pen.roundRect(box[0], box[1], wide, tall, label.kind === 'node' ? tall / 2 : 2);
    pen.fill();
    if (label.kind === 'node') pen.stroke();
    pen.fillStyle = ink;
    pen.fillText(label.text, x, y + 0.5);
    if (label.kind === 'panel') {
      pen.beginPath();
      pen.moveTo(box[0] + 4, box[3] - 3);
      pen.lineTo(box[2] - 4, box[3] - 3);
      pen.stroke();
    }
  }
}
