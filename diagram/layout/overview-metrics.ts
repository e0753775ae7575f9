import { MODULE } from '../symbols/types';

/** The rhythm of the overview: every length that placement and drawing share, 1/100 mm, multiples of the module. */
export const m = (modules: number): number => modules * MODULE;

/** Left edge of the drawing proper; the names of the bands stand left of it. */
export const LEFT = m(8);
/** Axis of the column, right of the bars of neutral and earth. */
export const COLUMN = m(56);

/** From a line bar's axis down to what hangs from it. */
export const BAR = {
  /** top of a way's device */
  device: m(2),
  /** middle of its ring */
  ring: m(9),
  ringRadius: 312,
  /** first tick of its cable */
  ticks: m(12),
  /** upper edge of the rooms' frames, where no cable has to move sideways */
  rooms: m(16),
} as const;

/** From the upper edge of a room's frame. */
export const ROOM = {
  box: m(3),
  /** rails of mains and of backup in the switchboard */
  mainsRail: m(4),
  backupRail: m(6),
  /** top of the row of switches: their dot is two modules below */
  switches: m(7),
  boxBottom: m(11),
  regulators: m(13),
  /** joints between a switch and its lamps */
  joints: m(16),
  loads: m(18),
  /** baseline of the designation under a load, and of its rating */
  loadRef: m(23),
  plugs: m(21),
  name: m(28),
  height: m(29),
  /** from the frame to the first and last axis */
  side: m(3),
  /** from the frame to the switchboard's box */
  boxSide: m(1),
  gap: m(1),
} as const;

/** From the lower edge of the rooms' frames down to the backup bar. */
export const FOOT = {
  ring: m(3),
  /** top of a way's device, which stands on its head */
  device: m(5),
  bar: m(12),
  /** baseline of the bar's name */
  name: m(14),
  /** axis of the neutral bar of the backup */
  neutral: m(16),
  height: m(17),
} as const;

/** Least distance of neighbouring ways' axes, so that cable data fits between them. */
export const WAY_PITCH = m(7);
