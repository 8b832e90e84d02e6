import { addScaled, type Vec3 } from '../../maths/vec3.js';
import type { Point2, StrutPart } from '../../model/parts.js';
import type { SectionShape } from '../../model/section.js';
import { VERSION } from '../../model/version.js';
import type { Assessment } from '../records.js';
import { ifcGuid } from './ifc-guid.js';
import { stepReal, stepText } from './step-text.js';

type Write = (entity: string, ...values: string[]) => string;

/**
 * The structure as IFC4 (ISO 16739-1:2018, ISO 10303-21 text), mm: an IfcElementAssembly TRUSS of an IfcMember STRUT a strut at its
 * cut length, an IfcPlate a panel and an IfcDiscreteAccessory a node connector (place only); marks as Name and Tag.
 */
export function writeTrussIfc(a: Pick<Assessment, 'job' | 'parts' | 'topology'>): string {
  const lines: string[] = [];
  const put: Write = (entity, ...values) => {
    lines.push(`#${lines.length + 1}=${entity}(${values.join(',')});`);
    return `#${lines.length}`;
  };
  const guid = (what: string): string => `'${ifcGuid(`${a.job.number} ${a.job.title} ${what}`)}'`;
  const frames = framesOf(put);
  const world = frames.placement([0, 0, 0], [0, 0, 1], [1, 0, 0]);
  const context = put('IFCGEOMETRICREPRESENTATIONCONTEXT', '$', "'Model'", '3', '1.E-05', world, '$');
  const body = put(
    'IFCGEOMETRICREPRESENTATIONSUBCONTEXT',
    "'Body'",
    "'Model'",
    '*',
    '*',
    '*',
    '*',
    context,
    '$',
    '.MODEL_VIEW.',
    '$',
  );
  const unit = (kind: string, prefix: string, name: string): string =>
    put('IFCSIUNIT', '*', `.${kind}.`, prefix, `.${name}.`);
  const units = put(
    'IFCUNITASSIGNMENT',
    list([
      unit('LENGTHUNIT', '.MILLI.', 'METRE'),
      unit('AREAUNIT', '$', 'SQUARE_METRE'),
      unit('VOLUMEUNIT', '$', 'CUBIC_METRE'),
      unit('PLANEANGLEUNIT', '$', 'RADIAN'),
    ]),
  );
  const title = stepText(a.job.title);
  const project = put('IFCPROJECT', guid('project'), '$', title, '$', '$', '$', '$', list([context]), units);
  const ground = put('IFCLOCALPLACEMENT', '$', world);
  const site = put(
    'IFCSITE',
    guid('site'),
    '$',
    "'Site'",
    '$',
    '$',
    ground,
    '$',
    '$',
    '.ELEMENT.',
    '$',
    '$',
    '$',
    '$',
    '$',
  );
  put('IFCRELAGGREGATES', guid('project site'), '$', '$', '$', project, list([site]));
  const assembly = put(
    'IFCELEMENTASSEMBLY',
    guid('truss'),
    '$',
    title,
    '$',
    '$',
    ground,
    '$',
    stepText(a.job.number || a.job.title),
    '.SITE.',
    '.TRUSS.',
  );
  put('IFCRELCONTAINEDINSPATIALSTRUCTURE', guid('site truss'), '$', '$', '$', list([assembly]), site);

  const materials = new Map<string, string[]>();
  const made: string[] = [];
  const element = (entity: string, mark: string, kind: string, placed: string, shape: string, type: string): string => {
    // What the standard's list of types does not have is named by its object type.
    const own = type === '.USERDEFINED.' ? "'NODE CONNECTOR'" : '$';
    const id = put(entity, guid(`${kind} ${mark}`), '$', stepText(mark), '$', own, placed, shape, stepText(mark), type);
    made.push(id);
    return id;
  };
  const of = (material: string | undefined, id: string): void => {
    if (material) materials.set(material, [...(materials.get(material) ?? []), id]);
  };
  const solid = (profile: string, position: string, direction: string, depth: number): string => {
    const extruded = put('IFCEXTRUDEDAREASOLID', profile, position, direction, stepReal(depth));
    const shape = put('IFCSHAPEREPRESENTATION', body, "'Body'", "'SweptSolid'", list([extruded]));
    return put('IFCPRODUCTDEFINITIONSHAPE', '$', '$', list([shape]));
  };
  const local = (origin: Vec3, z: Vec3, x: Vec3): string =>
    put('IFCLOCALPLACEMENT', ground, frames.placement(origin, z, x));

  for (const strut of a.parts.struts) {
    const { start, length } = cutOf(strut, a.topology.at(strut.ends[0].node));
    const profile = strut.section && sectionProfile(put, frames.flat(), strut.section.name, strut.section.shape);
    const placed = local(start, strut.axes.x, strut.axes.y);
    const shape = profile ? solid(profile, world, frames.direction([0, 0, 1]), length) : '$';
    of(strut.material?.name, element('IFCMEMBER', strut.mark, 'strut', placed, shape, '.STRUT.'));
  }
  for (const panel of a.parts.panels) {
    const { frame, thickness, seating } = panel;
    const low = seating === 'between' ? -thickness / 2 : seating === 'over' ? 0 : -thickness;
    const placed = local(addScaled(frame.origin, frame.z, low), frame.z, frame.x);
    const shape =
      panel.outline.length >= 3
        ? solid(
            outlineProfile(put, panel.mark, panel.outline, panel.holes),
            world,
            frames.direction([0, 0, 1]),
            thickness,
          )
        : '$';
    of(panel.material?.name, element('IFCPLATE', panel.mark, 'panel', placed, shape, '.SHEET.'));
  }
  for (const hub of a.parts.hubs) {
    const placed = local(hub.at, [0, 0, 1], [1, 0, 0]);
    of(hub.material.name, element('IFCDISCRETEACCESSORY', hub.mark, 'node', placed, '$', '.USERDEFINED.'));
  }
  if (made.length > 0) put('IFCRELAGGREGATES', guid('truss parts'), '$', '$', '$', assembly, list(made));
  for (const [name, users] of materials) {
    const material = put('IFCMATERIAL', stepText(name), '$', '$');
    put('IFCRELASSOCIATESMATERIAL', guid(`material ${name}`), '$', '$', '$', list(users), material);
  }
  return `${header(a)}${lines.join('\n')}\nENDSEC;\nEND-ISO-10303-21;\n`;
}

const list = (ids: readonly string[]): string => `(${ids.join(',')})`;

function header({ job }: Pick<Assessment, 'job'>): string {
  // A date is asked for by the format; without one in the job it is the first that dates of this kind count from.
  const date = `${job.date ?? '1970-01-01'}T00:00:00`;
  const program = stepText(`strutwright ${VERSION}`);
  return [
    'ISO-10303-21;',
    'HEADER;',
    "FILE_DESCRIPTION(('ViewDefinition [ReferenceView]'),'2;1');",
    `FILE_NAME(${stepText(job.title)},'${date}',(${stepText(job.drawnBy)}),(${stepText(job.owner)}),${program},${program},${stepText(job.approvedBy)});`,
    "FILE_SCHEMA(('IFC4'));",
    'ENDSEC;',
    'DATA;',
    '',
  ].join('\n');
}

/** Where a strut's timber begins and how long it is; node to node where it has no cut length. */
function cutOf(strut: StrutPart, from: Vec3): { readonly start: Vec3; readonly length: number } {
  const { setback, float } = strut.ends[0];
  if (strut.cutLength === null || setback === null || float === null) return { start: from, length: strut.axisLength };
  return { start: addScaled(from, strut.axes.x, setback + float), length: strut.cutLength };
}

function framesOf(put: Write) {
  const known = new Map<string, string>();
  const once = (key: string, make: () => string): string => {
    const found = known.get(key) ?? make();
    known.set(key, found);
    return found;
  };
  const numbers = (v: readonly number[]): string => list(v.map(stepReal));
  const direction = (v: readonly number[]): string => once(`d${v}`, () => put('IFCDIRECTION', numbers(v)));
  return {
    direction,
    placement: (origin: Vec3, z: Vec3, x: Vec3): string =>
      put('IFCAXIS2PLACEMENT3D', put('IFCCARTESIANPOINT', numbers(origin)), direction(z), direction(x)),
    /** The middle of a profile's plane. */
    flat: (): string =>
      once('flat', () => put('IFCAXIS2PLACEMENT2D', put('IFCCARTESIANPOINT', numbers([0, 0])), direction([1, 0]))),
  };
}

/** A section's profile; the local x of an IfcMember placed here is the strut's y, its y the strut's z. */
function sectionProfile(put: Write, flat: string, name: string, shape: SectionShape): string {
  const start = ['.AREA.', stepText(name), flat];
  switch (shape.kind) {
    case 'round':
      return put('IFCCIRCLEPROFILEDEF', ...start, stepReal(shape.diameter / 2));
    case 'tube':
      return put('IFCCIRCLEHOLLOWPROFILEDEF', ...start, stepReal(shape.diameter / 2), stepReal(shape.wall));
    case 'rectangle':
      return put('IFCRECTANGLEPROFILEDEF', ...start, stepReal(shape.width), stepReal(shape.height));
  }
}

function outlineProfile(
  put: Write,
  mark: string,
  outline: readonly Point2[],
  holes: readonly (readonly Point2[])[],
): string {
  const curve = (points: readonly Point2[]): string => {
    const corners = points.map((p) => put('IFCCARTESIANPOINT', list(p.map(stepReal))));
    return put('IFCPOLYLINE', list([...corners, corners[0]!]));
  };
  const outer = curve(outline);
  if (holes.length === 0) return put('IFCARBITRARYCLOSEDPROFILEDEF', '.AREA.', stepText(mark), outer);
  return put('IFCARBITRARYPROFILEDEFWITHVOIDS', '.AREA.', stepText(mark), outer, list(holes.map(curve)));
}
