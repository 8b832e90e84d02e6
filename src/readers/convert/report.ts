/** What a conversion did, as data; its words are made where it is shown. */
export interface ConvertReport {
  nodes: number;
  struts: number;
  faces: number;
  mergeTolerance_mm: number;
  merged: { points: number; farthest_mm: number };
  split: { crossings: number; struts: number };
  /** Struts that still cross without a node, and nodes that lie on a strut. */
  left: { crossings: number; nodesOnStruts: number };
  dropped: {
    strutsWithoutLength: number;
    doubleStruts: number;
    facesWithoutArea: number;
    doubleFaces: number;
    nodesAtOnePlace: number;
  };
  /** Struts made from the edges of faces, since the file had no lines. */
  strutsFromFaces: number;
  /** Edges of faces along which there is no strut. */
  faceEdgesWithoutStrut: number;
  facesFound: number;
  /** Nodes where one strut ends, and where none does: their marks. */
  freeEnds: string[];
  looseNodes: string[];
  forces: { given: number; unmatched: string[] };
  marks: { kept: number; new: number; withdrawn: string[]; prefixed: boolean };
  /** What stood in the file and was not read, by name, with its count. */
  leftOut: Record<string, number>;
}

export const emptyReport = (): ConvertReport => ({
  nodes: 0,
  struts: 0,
  faces: 0,
  mergeTolerance_mm: 0,
  merged: { points: 0, farthest_mm: 0 },
  split: { crossings: 0, struts: 0 },
  left: { crossings: 0, nodesOnStruts: 0 },
  dropped: { strutsWithoutLength: 0, doubleStruts: 0, facesWithoutArea: 0, doubleFaces: 0, nodesAtOnePlace: 0 },
  strutsFromFaces: 0,
  faceEdgesWithoutStrut: 0,
  facesFound: 0,
  freeEnds: [],
  looseNodes: [],
  forces: { given: 0, unmatched: [] },
  marks: { kept: 0, new: 0, withdrawn: [], prefixed: false },
  leftOut: {},
});
