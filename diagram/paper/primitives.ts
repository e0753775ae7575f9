import { fontSize, SPACING } from '../layout/lettering';

/** What both writers, SVG and PDF, know how to put on paper. Lengths are 1/100 mm of the group they stand in. */
export interface PathMark {
  kind: 'path';
  /** M L H V C A Z, absolute */
  d: string;
  /** colour, or none */
  stroke?: string;
  /** 1/100 mm on paper, whatever the group's scale */
  width?: number;
  /** 1/100 mm on paper: on, off */
  dash?: readonly [number, number];
  fill?: string;
  cap?: 'round' | 'butt';
}

export interface TextMark {
  kind: 'text';
  x: number;
  y: number;
  text: string;
  /** height of the capitals, in the group's unit */
  size: number;
  colour: string;
  bold?: boolean;
  anchor?: 'start' | 'middle' | 'end';
  /** quarter turns, clockwise */
  turn?: 0 | 1 | 2 | 3;
  spaced?: boolean;
}

export type Mark = PathMark | TextMark;

/** Marks under one transform: first turned, then scaled, then moved. */
export interface Group {
  x: number;
  y: number;
  scale: number;
  /** quarter turns, clockwise about the group's origin */
  turn?: 0 | 1 | 2 | 3;
  /** what is seen of it, in its own unit */
  clip?: { x: number; y: number; width: number; height: number };
  marks: Mark[];
  /** a picture beneath the marks, from the group's origin: its name, and its size in the group's unit */
  picture?: { name: string; width: number; height: number };
  /** groups within, painted after the marks */
  groups?: Group[];
}

/** A sheet of paper: its size in 1/100 mm and what stands on it, in painting order. */
export interface Page {
  width: number;
  height: number;
  groups: Group[];
}

/** Letter spacing of a spaced text, in the unit of its size. */
export const letterSpacing = (mark: TextMark): number => (mark.spaced ? SPACING * mark.size : 0);
export const fontSizeOf = (mark: TextMark): number => fontSize(mark.size);
