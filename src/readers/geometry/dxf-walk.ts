import type { Vec3 } from '../../maths/vec3.js';
import { LIMITS } from '../../model/limits.js';
import { quoted } from '../fault.js';
import { type DxfThing, numberOf, textOf } from './dxf-groups.js';
import { countOf, insertOf, type Place } from './dxf-insert.js';
import type { LineFaults } from './text-lines.js';

/** An entity of the model where it stands, whether drawn there or through blocks. */
export interface DxfEntity {
  readonly thing: DxfThing;
  /** The VERTEX entities of a POLYLINE, else none. */
  readonly vertices: readonly DxfThing[];
  /** Its layer; for layer 0 in a block the layer of the block's insert. */
  readonly layer: string;
  /** From its axes to the model's. */
  readonly place: Place;
  /** How much larger than drawn it stands at most. */
  readonly scale: number;
}

/** Inserts, entities and corners that blocks may open to: ten inserts of ten inserts of ten ... would fill any memory. */
const MOST_OPENED = 4 * (LIMITS.members + LIMITS.faces);
/** Groups that a corner or an index takes in an entity, at least. */
const GROUPS_A_CORNER = 2;
/** Levels of blocks within blocks; drawings have three or four. */
const MOST_LEVELS = 32;
const LAYER_OF_INSERT = '0';

interface Block {
  readonly base: Vec3;
  readonly things: readonly DxfThing[];
  readonly external: boolean;
}

/**
 * Hands over every entity of the model space, blocks opened, nested ones too: placed, scaled, turned, mirrored and arrayed.
 * What stands in paper space and inserts that lead nowhere are told to `leave` by name. A block within itself, a number that is
 * not finite and more entities than the limits allow are faults.
 */
export function walkDxf(
  sections: ReadonlyMap<string, readonly DxfThing[]>,
  log: LineFaults,
  leave: (what: string) => void,
  visit: (entity: DxfEntity) => void,
): void {
  const blocks = blocksOf(sections.get('BLOCKS') ?? []);
  let opened = 0;
  let full = false;
  const tooMany = (line: number, more: number): boolean => {
    opened += more;
    if (opened > MOST_OPENED && !full) {
      full = true;
      log.tell(line, `has more than ${MOST_OPENED} entities with its blocks opened`, 'split the file');
    }
    return full;
  };

  const open = (insert: DxfThing, around: DxfEntity, within: readonly string[]): void => {
    const name = (textOf(insert, 2) ?? '').toLowerCase();
    const block = blocks.get(name);
    const count = countOf(insert);
    if (!block) leave('INSERT of a block that the file does not have');
    else if (block.external) leave('INSERT of a block in another file');
    else if (within.includes(name) || within.length >= MOST_LEVELS)
      log.tell(insert.line, `the block ${quoted(name)} stands within itself`, 'explode it, and export again');
    else if (count > 0 && tooMany(insert.line, count)) return;
    else {
      const placed = count > 0 ? insertOf(insert, block.base) : null;
      if (!placed)
        log.tell(insert.line, 'INSERT has a number that is not finite, or a scale of nought', 'export it again');
      for (const place of placed?.places ?? [])
        each(block.things, { ...around, place: (p) => around.place(place(p)), scale: around.scale * placed!.scale }, [
          ...within,
          name,
        ]);
    }
  };

  const each = (things: readonly DxfThing[], around: DxfEntity, within: readonly string[]): void => {
    for (let i = 0; i < things.length && !full && log.faults.length < MOST_FAULTS; i++) {
      const thing = things[i]!;
      const vertices: DxfThing[] = [];
      const follows = FOLLOWED_BY.get(thing.type);
      if (follows !== undefined) {
        while (things[i + 1]?.type === follows) vertices.push(things[++i]!);
        if (things[i + 1]?.type === 'SEQEND') i++;
      }
      if (thing.type === '' || thing.type === 'ENDSEC') continue;
      const corners = vertices.length + Math.trunc(thing.groups.length / GROUPS_A_CORNER);
      if (within.length > 0 && tooMany(thing.line, 1 + corners)) return;
      // Paper space is the sheet, not the model.
      if (numberOf(thing, 67) === 1) {
        leave(`${thing.type} in paper space`);
        continue;
      }
      const own = textOf(thing, 8) ?? '';
      const layer = within.length > 0 && own === LAYER_OF_INSERT ? around.layer : own;
      if (thing.type === 'INSERT') {
        for (const text of vertices) leave(text.type);
        open(thing, { ...around, layer }, within);
      } else visit({ ...around, thing, vertices, layer });
    }
  };
  each(sections.get('ENTITIES') ?? [], { thing: NOTHING, vertices: [], layer: '', place: (p) => p, scale: 1 }, []);
}

const NOTHING: DxfThing = { type: '', line: 1, groups: [] };
/** Faults past these are not kept, so nothing more is looked for. */
const MOST_FAULTS = 100;
const FOLLOWED_BY: ReadonlyMap<string, string> = new Map([
  ['POLYLINE', 'VERTEX'],
  ['INSERT', 'ATTRIB'],
]);

/** The blocks by name, whatever the case. */
function blocksOf(things: readonly DxfThing[]): ReadonlyMap<string, Block> {
  const blocks = new Map<string, Block>();
  let inside: DxfThing[] | null = null;
  for (const thing of things) {
    if (thing.type === 'ENDBLK') inside = null;
    else if (thing.type === 'BLOCK') {
      inside = [];
      blocks.set((textOf(thing, 2) ?? '').toLowerCase(), {
        base: [numberOf(thing, 10), numberOf(thing, 20), numberOf(thing, 30)],
        things: inside,
        // Flags 4 and 8: the block is a reference to another file.
        external: (numberOf(thing, 70) & 12) !== 0,
      });
    } else inside?.push(thing);
  }
  return blocks;
}
