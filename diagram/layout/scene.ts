import type { End, Face, Kind, Role } from '../document/schema';
import type { Side } from '../symbols/types';
import type { Feed } from '../terminals/feeds';
import type { Line } from './route-grid';

/**
 * A face of the document as things to draw: the one source of screen, SVG, PNG and PDF. Lengths are 1/100 mm, integers,
 * from the face's own origin. Nothing here is stored; the document holds positions, the scene is worked out.
 */
export interface Point {
  x: number;
  y: number;
}

export type { Feed };

export interface SceneText extends Point {
  text: string;
  /** 1/100 mm, height of the capitals (ISO 3098): 250 is the body size; the font size is `fontSize(size)` of `lettering.ts` */
  size: number;
  bold?: boolean;
  tone?: 'ink' | 'grey';
  anchor?: 'start' | 'middle' | 'end';
  /** quarter turns, clockwise */
  turn?: 0 | 1 | 2 | 3;
  spaced?: boolean;
}

export interface SceneTerminal extends Point {
  mark: string;
  side: Side;
}

export interface ScenePart extends Point {
  id: string;
  kind: Kind;
  /** id of the symbol in `diagram/symbols` */
  symbol: string;
  turn: 0 | 1 | 2 | 3;
  /** after turning */
  width: number;
  height: number;
  feed: Feed;
  /** where wires end, absolute */
  terminals: SceneTerminal[];
  /** designation, ratings: absolute, placed so that they meet nothing */
  texts: SceneText[];
  /** id of the frame it stands in */
  frame?: string;
}

/** A run: on the overview the cores of one cable drawn as one line; on the connections face one core. */
export interface SceneRun {
  id: string;
  wires: string[];
  cable?: string;
  from: End;
  to: End;
  /** the end that another run of the same page draws: here it stops under or over the brace of its cable */
  cut?: 'from' | 'to';
  /** orthogonal, at least two points */
  points: Point[];
  role: Role;
  feed: Feed;
  /** IEC 60757 code of the core, on the connections face */
  colour?: string;
  weight: 'thin' | 'normal' | 'heavy';
  /** marks across the run, one a core: plain L, dotted N, barred PE */
  ticks?: { at: Point; vertical: boolean; cores: ('L' | 'N' | 'E')[] };
  texts: SceneText[];
  /** lines along which somebody led it by hand, in order from its first end */
  lines?: readonly Line[];
  /** places where this run hops over another that it does not join, in order along it */
  hops: Point[];
}

/** The number of a way in its ring, on the run that leaves its device. */
export interface SceneRing extends Point {
  radius: number;
  text: string;
  /** id of the way's device */
  part: string;
  feed: Feed;
}

export interface SceneFrame extends Point {
  id: string;
  /** room: dashed, named at its foot; switchboard: solid box; lane: tinted ground of the backup source; brace: over a cable's cores */
  kind: 'room' | 'switchboard' | 'lane' | 'brace';
  width: number;
  height: number;
  texts: SceneText[];
  /** id of the place, where it is one */
  place?: string;
}

export interface Scene {
  face: Face;
  /** the place shown, on the connections face */
  place?: string;
  width: number;
  height: number;
  bands: { y: number; height: number; name: string }[];
  frames: SceneFrame[];
  parts: ScenePart[];
  runs: SceneRun[];
  rings: SceneRing[];
  /** joints of conductors: drawn as filled circles */
  dots: (Point & { feed: Feed })[];
  texts: SceneText[];
}
