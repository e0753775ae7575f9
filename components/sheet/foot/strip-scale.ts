import type { Scene } from '@/diagram/layout/scene';

/** px of the strip: where the line bar lies, the rooms stand, the backup bar lies, and its whole height */
export const STRIP = { bar: 8, rooms: 13, roomsEnd: 31, backup: 36, height: 42 } as const;

/**
 * How a height of the drawing stands on the strip. The strip is no picture to scale: the rooms, by which one finds one's
 * way, have the most of it.
 * @returns of a height in 1/100 mm, its px on the strip
 */
export function stripScale(scene: Pick<Scene, 'frames' | 'height'>): (y: number) => number {
  const rooms = scene.frames.filter((frame) => frame.kind === 'room');
  if (rooms.length === 0) return (y) => (y / Math.max(1, scene.height)) * STRIP.height;
  const top = Math.min(...rooms.map((room) => room.y));
  const foot = Math.max(...rooms.map((room) => room.y + room.height));
  return (y) => {
    if (y < top) return STRIP.rooms * Math.max(0, y / top);
    if (y <= foot) return STRIP.rooms + ((y - top) / (foot - top)) * (STRIP.roomsEnd - STRIP.rooms);
    const below = (y - foot) / Math.max(1, scene.height - foot);
    return STRIP.roomsEnd + Math.min(1, below) * (STRIP.height - STRIP.roomsEnd);
  };
}
