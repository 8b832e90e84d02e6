/** Handles that one part of a DXF file names and another holds. All below 100 are the frame's own. */
export const MODEL_RECORD = '1F';
export const PAPER_RECORD = '1B';
export const MODEL_LAYOUT = '22';
export const PAPER_LAYOUT = '1E';
export const LAYER_TABLE = '2';
export const PLOT_STYLE = 'F';
/** The first handle that is free for layers and entities. */
export const FIRST_FREE = 0x100;
