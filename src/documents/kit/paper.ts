import type { Job } from '../../model/job/index.js';
import { writeFitted, writeWrapped } from './fit-text.js';
import type { Fonts } from './fonts.js';
import type { Area } from './geometry2.js';
import { INK, SIZE } from './ink.js';
import { MARGIN, type Orientation, pageSize } from './page-format.js';
import { lineHeight, Pen, type PlacedText } from './pen.js';
import { drawHoldStamp } from './stamp.js';
import { drawTitleBlock, TITLE_BLOCK_HEIGHT } from './title-block.js';

/** What stands in every title block of a pack, and what holds it up. */
export interface Issue {
  readonly job: Job;
  readonly fonts: Fonts;
  /** Reasons of a hold, in words; empty: none. */
  readonly hold: readonly string[];
  /** Checks that the job's use asks for and that were not made, in words. */
  readonly notMade: readonly string[];
}

export interface SheetSpec {
  /** The sheet's title, at its head. */
  readonly title: string;
  /** What to do with the sheet: one line. */
  readonly instruction: string;
  readonly orientation?: Orientation;
  /** Whether views stand by projection, so that the symbol matters. */
  readonly projection?: boolean;
}

export interface Written {
  readonly bytes: Uint8Array;
  readonly sheets: number;
  /** Every text as placed, mm: what tests hold against each other. */
  readonly placed: readonly PlacedText[];
}

/** One paper of several sheets: heads and strips are drawn here, what stands between them elsewhere. */
export class Paper {
  readonly pen: Pen;
  private readonly sheets: SheetSpec[] = [];
  private area: Area = { x: 0, y: 0, width: 0, height: 0 };

  constructor(
    private readonly issue: Issue,
    private readonly documentType: string,
    private readonly caution: string,
    private readonly units: string,
  ) {
    const { job } = issue;
    this.pen = new Pen({
      fonts: issue.fonts,
      title: `${job.title}: ${documentType.toLowerCase()}`,
      author: job.drawnBy === '' ? job.owner : job.drawnBy,
      subject: `${job.number} revision ${job.revision}`.trim(),
      date: job.date,
    });
  }

  /** Where the present sheet may be drawn on. */
  get room(): Area {
    return this.area;
  }

  /** Starts a sheet: stamp, title, instruction. Returns the area left. */
  addSheet(spec: SheetSpec): Area {
    const { paper } = this.issue.job.output;
    const size = pageSize(paper, spec.orientation);
    this.pen.addSheet(size.width, size.height);
    this.sheets.push(spec);
    const width = size.width - 2 * MARGIN;
    let y = MARGIN;
    const stamp = drawHoldStamp(this.pen, { x: MARGIN, y, width, height: 0 }, this.issue.hold);
    y += stamp > 0 ? stamp + 3 : 0;
    writeFitted(this.pen, spec.title, MARGIN, y + 6.5, width, { size: SIZE.title, bold: true }, SIZE.head);
    y += 12;
    y = writeWrapped(this.pen, spec.instruction, MARGIN, y + 1, width, { size: SIZE.body }, 3);
    if (this.issue.notMade.length > 0)
      y = writeWrapped(
        this.pen,
        `Not checked, though this use asks for it: ${this.issue.notMade.join(', ')}.`,
        MARGIN,
        y,
        width,
        { bold: true },
        2,
      );
    y += 1.5;
    const foot = size.height - MARGIN - TITLE_BLOCK_HEIGHT;
    this.area = { x: MARGIN, y, width, height: foot - 4 - y };
    return this.area;
  }

  /** The way to lay a sheet at which a picture comes out larger; upright where wide gains little. */
  orientationFor(size: (room: { readonly width: number; readonly height: number }) => number): Orientation {
    const factor = (orientation: Orientation): number => {
      const page = pageSize(this.issue.job.output.paper, orientation);
      return size({ width: page.width - 2 * MARGIN, height: page.height - 2 * MARGIN - TITLE_BLOCK_HEIGHT - HEAD });
    };
    return factor('wide') > GAIN * factor('upright') ? 'wide' : 'upright';
  }

  /** Starts another sheet like the last. */
  continueSheet(): Area {
    const last = this.sheets.at(-1)!;
    return this.addSheet({
      ...last,
      title: last.title.endsWith(CONTINUED) ? last.title : `${last.title}${CONTINUED}`,
    });
  }

  /** Writes a heading inside a sheet with its baseline below y; returns where the next thing may start. */
  heading(text: string, y: number): number {
    writeFitted(this.pen, text, this.area.x, y + 5, this.area.width, { size: SIZE.head, bold: true }, SIZE.body);
    return y + 8;
  }

  /** Writes a paragraph; returns where the next thing may start. */
  paragraph(text: string, y: number, style: { size?: number; bold?: boolean; colour?: string } = {}): number {
    const size = style.size ?? SIZE.body;
    return (
      writeWrapped(this.pen, text, this.area.x, y + lineHeight(size) * 0.8, this.area.width, {
        colour: INK.black,
        ...style,
      }) -
      lineHeight(size) * 0.4
    );
  }

  /** Draws the strips along the feet, now that the number of sheets is known, and closes the file. */
  async finish(): Promise<Written> {
    const { job } = this.issue;
    this.sheets.forEach((spec, i) => {
      this.pen.turnTo(i);
      const size = pageSize(job.output.paper, spec.orientation);
      drawTitleBlock(
        this.pen,
        {
          x: MARGIN,
          y: size.height - MARGIN - TITLE_BLOCK_HEIGHT,
          width: size.width - 2 * MARGIN,
          height: TITLE_BLOCK_HEIGHT,
        },
        {
          owner: job.owner,
          number: job.number,
          date: job.date ?? '',
          title: job.title,
          approvedBy: job.approvedBy,
          drawnBy: job.drawnBy,
          documentType: this.documentType,
          revision: job.revision,
          units: this.units,
          caution: this.caution,
          projection: spec.projection ? job.output.projection : null,
        },
        i + 1,
        this.sheets.length,
      );
    });
    return { bytes: await this.pen.finish(), sheets: this.sheets.length, placed: this.pen.placed };
  }
}

/** What title and instruction take of a sheet, and a legend under a picture, about, mm. */
const HEAD = 40;
/** How much larger a picture must come out before its sheet is turned. */
const GAIN = 1.12;
const CONTINUED = ', continued';
