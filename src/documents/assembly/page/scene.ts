import {
  AmbientLight,
  BufferGeometry,
  Color,
  CylinderGeometry,
  DirectionalLight,
  DoubleSide,
  DynamicDrawUsage,
  Float32BufferAttribute,
  InstancedMesh,
  Matrix4,
  Mesh,
  MeshBasicMaterial,
  MeshLambertMaterial,
  OrthographicCamera,
  Quaternion,
  Raycaster,
  Scene,
  ShapeUtils,
  SphereGeometry,
  Vector2,
  Vector3,
  WebGLRenderer,
} from 'three';
import { OrbitControls } from 'three/examples/jsm/controls/OrbitControls.js';
import type { PageData } from './data.js';

/** How a part is shown: not yet there, there, new in this step, picked. */
export type Look = 'absent' | 'earlier' | 'new' | 'picked';

export interface Inks {
  readonly ground: string;
  readonly earlier: string;
  readonly fresh: string;
  readonly picked: string;
  readonly tension: string;
  readonly compression: string;
  readonly idle: string;
  readonly panel: string;
  readonly prop: string;
}

export interface PartRef {
  readonly kind: 'node' | 'strut' | 'panel';
  readonly index: number;
}

export interface View {
  readonly canvas: HTMLCanvasElement;
  show(
    looks: {
      readonly nodes: readonly Look[];
      readonly struts: readonly Look[];
      readonly panels: readonly Look[];
      readonly propped: readonly number[];
    },
    forces: boolean,
  ): void;
  setInks(inks: Inks): void;
  resize(width: number, height: number, room: { readonly right: number; readonly bottom: number }): void;
  /** Part under a point of the canvas, css pixels. */
  pick(x: number, y: number): PartRef | null;
  /** Where a point of the truss stands on the canvas, css pixels. */
  project(p: readonly [number, number, number]): readonly [number, number];
  look(): void;
  turn(az: number, el: number): void;
  draw(): void;
}

const UP = new Vector3(0, 1, 0);
/** Widest line of a force, mm on the largest force, as a share of the truss's size. */
const WIDEST = 0.016;
/** Where the eye stands at first, relative to the truss's middle and size; and the sine of its height. */
const EYE = [3, -5, 2.6] as const;
const SINE = EYE[2] / Math.hypot(...EYE);
/** Room round the truss, so that marks at its edge stay on the picture. */
const FRAMES = 1.1;
/** Struts beyond which parts are drawn with fewer sides. */
const MANY = 500;

/** The truss in three dimensions, z up; nothing but what the parts are. Null where the browser has no WebGL. */
export function makeView(data: PageData, canvas: HTMLCanvasElement, redraw: () => void): View | null {
  let renderer: WebGLRenderer;
  try {
    renderer = new WebGLRenderer({ canvas, antialias: true, preserveDrawingBuffer: true });
  } catch {
    return null;
  }
  const scene = new Scene();
  // A part of a large truss is a few pixels wide: fewer sides are enough, and slow machines turn it all the same.
  const many = data.struts.length > MANY;
  const bounds = boundsOf(data);
  const camera = new OrthographicCamera(-1, 1, 1, -1, 0.1, bounds.size * 20);
  camera.up.set(0, 0, 1);
  const controls = new OrbitControls(camera, canvas);
  controls.enableDamping = false;
  controls.zoomToCursor = true;
  controls.addEventListener('change', redraw);

  scene.add(new AmbientLight(0xffffff, 1.7));
  const sun = new DirectionalLight(0xffffff, 1.9);
  sun.position.set(-0.4, -0.8, 1);
  scene.add(sun);

  const solid = (): MeshLambertMaterial => new MeshLambertMaterial({ color: 0xffffff });
  const rods = new InstancedMesh(
    new CylinderGeometry(1, 1, 1, many ? 8 : 14, 1, many),
    solid(),
    Math.max(1, data.struts.length),
  );
  // The white core of a tension line is drawn over its own rod: moved towards the eye, not in the way of other parts.
  const coreInk = new MeshBasicMaterial({ color: 0xffffff });
  coreInk.onBeforeCompile = (shader) => {
    shader.vertexShader = shader.vertexShader.replace(
      '#include <project_vertex>',
      '#include <project_vertex>\n gl_Position.z -= 0.004 * gl_Position.w;',
    );
  };
  const cores = new InstancedMesh(
    new CylinderGeometry(1, 1, 1, many ? 6 : 10, 1, many),
    coreInk,
    Math.max(1, data.struts.length),
  );
  const balls = new InstancedMesh(
    many ? new SphereGeometry(1, 10, 7) : new SphereGeometry(1, 18, 12),
    solid(),
    Math.max(1, data.nodes.length),
  );
  const props = new InstancedMesh(new CylinderGeometry(0.35, 1, 1, 10, 1), solid(), Math.max(1, data.nodes.length));
  for (const mesh of [rods, cores, balls, props]) {
    mesh.instanceMatrix.setUsage(DynamicDrawUsage);
    mesh.frustumCulled = false;
    scene.add(mesh);
  }
  const plates = data.panels.map((panel) => {
    const mesh = new Mesh(
      plateGeometry(panel.corners),
      new MeshBasicMaterial({
        transparent: true,
        opacity: 0.3,
        side: DoubleSide,
        forceSinglePass: true,
        depthWrite: false,
      }),
    );
    scene.add(mesh);
    return mesh;
  });

  let inks: Inks | null = null;
  let last: Parameters<View['show']> | null = null;
  const largest = data.struts.reduce((m, s) => Math.max(m, Math.abs(s.force ?? 0)), 0);
  const frames = data.struts.map((s) => frameOf(data, s.ends));

  const view: View = {
    canvas,
    setInks(next) {
      inks = next;
      scene.background = new Color(next.ground);
      if (last) view.show(...last);
    },
    show(looks, forces) {
      last = [looks, forces];
      if (!inks) return;
      const ink = inks;
      const plain = (look: Look): string => (look === 'picked' ? ink.picked : look === 'new' ? ink.fresh : ink.earlier);
      data.struts.forEach((s, i) => {
        const look = looks.struts[i]!;
        const f = s.force ?? 0;
        const wide = forces
          ? Math.max(0.0015 * bounds.size, WIDEST * bounds.size * Math.sqrt(largest > 0 ? Math.abs(f) / largest : 0))
          : s.radius;
        const signed = Math.abs(f) < 1e-9 ? ink.idle : f > 0 ? ink.tension : ink.compression;
        place(rods, i, frames[i]!, look === 'absent' ? 0 : wide, forces && look !== 'picked' ? signed : plain(look));
        place(cores, i, frames[i]!, forces && f > 1e-9 && look !== 'absent' ? wide * 0.42 : 0, ink.ground);
      });
      data.nodes.forEach((n, i) => {
        const look = looks.nodes[i]!;
        const r = look === 'absent' ? 0 : n.radius;
        balls.setMatrixAt(i, new Matrix4().makeScale(r, r, r).setPosition(...n.at));
        balls.setColorAt(i, new Color(plain(look)));
      });
      data.nodes.forEach((n, i) => {
        const on = looks.propped.includes(i);
        const tall = on ? Math.max(n.at[2] - bounds.low[2], bounds.size * 0.06) : 0;
        const wide = on ? bounds.size * 0.012 : 0;
        const m = new Matrix4().makeRotationX(Math.PI / 2).multiply(new Matrix4().makeScale(wide, tall, wide));
        props.setMatrixAt(i, m.setPosition(n.at[0], n.at[1], n.at[2] - tall / 2 - n.radius));
        props.setColorAt(i, new Color(ink.prop));
      });
      for (const mesh of [rods, cores, balls, props]) {
        mesh.instanceMatrix.needsUpdate = true;
        if (mesh.instanceColor) mesh.instanceColor.needsUpdate = true;
        mesh.computeBoundingSphere();
      }
      cores.visible = forces;
      props.visible = looks.propped.length > 0;
      plates.forEach((mesh, i) => {
        const look = looks.panels[i]!;
        mesh.visible = look !== 'absent';
        mesh.material.color.set(look === 'new' ? ink.fresh : look === 'picked' ? ink.picked : ink.panel);
        mesh.material.opacity = look === 'earlier' ? 0.16 : 0.4;
      });
    },
    resize(width, height, room) {
      renderer.setPixelRatio(Math.min(2, devicePixelRatio));
      renderer.setSize(width, height, false);
      // The truss stands in the middle of what the card leaves free.
      const [free, tall] = [Math.max(80, width - room.right), Math.max(80, height - room.bottom)];
      // Whichever way it is turned about its upright axis, seen from the height that it is first seen from.
      const upright = bounds.wide * SINE + bounds.high * Math.sqrt(1 - SINE * SINE);
      const scale = Math.max(bounds.wide / free, upright / tall) * 2 * FRAMES;
      camera.left = (-free / 2) * scale;
      camera.right = (width - free / 2) * scale;
      camera.top = (tall / 2) * scale;
      camera.bottom = -(height - tall / 2) * scale;
      camera.updateProjectionMatrix();
    },
    pick(x, y) {
      const at = new Vector2((x / canvas.clientWidth) * 2 - 1, 1 - (y / canvas.clientHeight) * 2);
      const ray = new Raycaster();
      ray.setFromCamera(at, camera);
      const hits = ray.intersectObjects<Mesh | InstancedMesh>([balls, rods, ...plates.filter((p) => p.visible)], false);
      const hit = hits.find((h) => h.object === balls || h.object === rods) ?? hits[0];
      if (!hit) return null;
      if (hit.object === balls) return { kind: 'node', index: hit.instanceId! };
      if (hit.object === rods) return { kind: 'strut', index: hit.instanceId! };
      return { kind: 'panel', index: plates.indexOf(hit.object as (typeof plates)[number]) };
    },
    project(p) {
      const v = new Vector3(...p).project(camera);
      return [((v.x + 1) / 2) * canvas.clientWidth, ((1 - v.y) / 2) * canvas.clientHeight];
    },
    look() {
      controls.target.set(...bounds.middle);
      camera.position.set(
        bounds.middle[0] + bounds.size * EYE[0],
        bounds.middle[1] + bounds.size * EYE[1],
        bounds.middle[2] + bounds.size * EYE[2],
      );
      camera.zoom = 1;
      camera.updateProjectionMatrix();
      controls.update();
    },
    turn(az, el) {
      const offset = camera.position.clone().sub(controls.target);
      offset.applyAxisAngle(new Vector3(0, 0, 1), az);
      const side = new Vector3(0, 0, 1).cross(offset).normalize();
      const tilted = offset.clone().applyAxisAngle(side, el);
      if (Math.hypot(tilted.x, tilted.y) > 0.05 * tilted.length()) offset.copy(tilted);
      camera.position.copy(controls.target).add(offset);
      controls.update();
    },
    draw: () => renderer.render(scene, camera),
  };
  view.look();
  return view;
}

interface Bounds {
  readonly low: readonly [number, number, number];
  readonly middle: readonly [number, number, number];
  /** Diameter of the sphere about the middle that holds every node, mm. */
  readonly size: number;
  /** Farthest node from the upright axis through the middle, and half the height, mm. */
  readonly wide: number;
  readonly high: number;
}

function boundsOf(data: PageData): Bounds {
  const low: [number, number, number] = [Infinity, Infinity, Infinity];
  const high: [number, number, number] = [-Infinity, -Infinity, -Infinity];
  for (const n of data.nodes)
    for (const k of [0, 1, 2] as const) {
      low[k] = Math.min(low[k], n.at[k]);
      high[k] = Math.max(high[k], n.at[k]);
    }
  if (data.nodes.length === 0) return { low: [0, 0, 0], middle: [0, 0, 0], size: 1, wide: 1, high: 1 };
  const middle = [0, 1, 2].map((k) => (low[k]! + high[k]!) / 2) as [number, number, number];
  const reach = data.nodes.reduce((m, n) => Math.max(m, Math.hypot(...n.at.map((v, k) => v - middle[k]!))), 0.5);
  const wide = data.nodes.reduce((m, n) => Math.max(m, Math.hypot(n.at[0] - middle[0], n.at[1] - middle[1])), 0.5);
  return { low, middle, size: 2 * reach, wide, high: (high[2] - low[2]) / 2 };
}

interface RodFrame {
  readonly middle: Vector3;
  readonly turn: Quaternion;
  readonly length: number;
}

function frameOf(data: PageData, ends: readonly [number, number]): RodFrame {
  const [a, b] = ends.map((n) => new Vector3(...data.nodes[n]!.at)) as [Vector3, Vector3];
  const along = b.clone().sub(a);
  return {
    middle: a.clone().add(b).multiplyScalar(0.5),
    length: along.length(),
    turn: new Quaternion().setFromUnitVectors(UP, along.normalize()),
  };
}

function place(mesh: InstancedMesh, i: number, f: RodFrame, radius: number, colour: string): void {
  mesh.setMatrixAt(i, new Matrix4().compose(f.middle, f.turn, new Vector3(radius, radius > 0 ? f.length : 0, radius)));
  mesh.setColorAt(i, new Color(colour));
}

/** A flat polygon, cut into triangles in its own plane. */
function plateGeometry(corners: readonly (readonly [number, number, number])[]): BufferGeometry {
  const geometry = new BufferGeometry();
  if (corners.length < 3) return geometry;
  const points = corners.map((c) => new Vector3(...c));
  const x = points[1]!.clone().sub(points[0]!).normalize();
  const normal = new Vector3();
  for (const [i, p] of points.entries()) normal.add(p.clone().cross(points[(i + 1) % points.length]!));
  const y = normal.normalize().clone().cross(x);
  const flat = points.map((p) => new Vector2(p.clone().sub(points[0]!).dot(x), p.clone().sub(points[0]!).dot(y)));
  geometry.setAttribute(
    'position',
    new Float32BufferAttribute(
      points.flatMap((p) => p.toArray()),
      3,
    ),
  );
  geometry.setIndex(ShapeUtils.triangulateShape(flat, []).flat());
  return geometry;
}
