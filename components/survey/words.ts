/** "3 h 24": hours as a person says them. */
export function hoursWords(hours: number): string {
  const minutes = Math.round(hours * 60);
  const rest = minutes % 60;
  return rest === 0 ? `${minutes / 60} h` : `${Math.floor(minutes / 60)} h ${String(rest).padStart(2, '0')}`;
}

export const roomsWords = (count: number): string => `${count} ${count === 1 ? 'room' : 'rooms'}`;
