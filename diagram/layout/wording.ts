import { polesOf } from '../document/kinds';
import type { Cable, Installation, Part } from '../document/schema';

/** What is written beside parts and cables: designation, ratings, sizes. Short, in the trade's order. */

/** 3000 as "3 kW", 55 as "55 W". */
export const wattsText = (watts: number): string =>
  watts >= 1000 ? `${Number((watts / 1000).toFixed(2))} kW` : `${Number(watts.toFixed(1))} W`;

/** 0.03 as "30 mA". */
export const milliampsText = (amps: number): string => `${Number((amps * 1000).toFixed(1))} mA`;

/** The designation printed on the drawing; the id where none is given and one is needed to speak of the part. */
export const designation = (part: Part): string => part.ref ?? part.id;

const amps = (value: number | undefined): string | undefined => (value === undefined ? undefined : `${value} A`);
const join = (...words: (string | undefined | false)[]): string => words.filter(Boolean).join(' ');

const residual = (part: { sensitivity?: number; type?: string; delay?: string }): string =>
  join(part.sensitivity !== undefined && milliampsText(part.sensitivity), part.type, part.delay === 'S' && 'S');

/** Ratings in lines, most telling first; empty where the drawing gives none. */
export function ratingLines(part: Part): string[] {
  const lines: string[] = (() => {
    switch (part.kind) {
      case 'fuse':
        return [join(amps(part.rating), part.standard)];
      case 'meter':
        return [join(amps(part.rating))];
      case 'isolator':
        return [join(amps(part.rating), polesOf(part) === 2 && '2P')];
      case 'mcb':
        return [join(`${part.curve ?? ''}${part.rating ?? ''}`, polesOf(part) === 2 && '2P', part.spare && 'spare')];
      case 'rcd':
        return [join(amps(part.rating), residual(part))];
      case 'rcbo':
        return [
          join(`${part.curve ?? ''}${part.rating ?? ''}`, polesOf(part) === 2 && part.poles === 2 && '2P'),
          residual(part),
        ];
      case 'spd':
        return [part.class ? `class ${part.class}` : ''];
      case 'line-bar':
        return [join(amps(part.rating))];
      case 'changeover':
        return [join(amps(part.rating), polesOf(part) === 2 && '2P')];
      case 'inverter':
        return [
          part.va ? `${part.va} VA` : '',
          part.neutral ? `N ${part.neutral}` : '',
          part.bond ? 'bonds on battery' : '',
        ];
      case 'battery':
        return [
          join(
            part.count !== undefined && part.count > 1 && `${part.count} ×`,
            part.volts !== undefined && `${part.volts} V`,
            part.ah !== undefined && `${part.ah} Ah`,
          ),
        ];
      case 'socket':
        return [amps(part.rating) ?? (part.load ? wattsText(part.load) : '')];
      case 'lamp':
      case 'fan':
      case 'appliance':
        return [part.watts === undefined ? '' : wattsText(part.watts)];
      case 'bond':
        return [part.to ?? ''];
      default:
        return [];
    }
  })();
  return lines.filter(Boolean);
}

/** "3×1.5" for a cable of three cores of 1.5 mm²; the live size alone where the cores are not drawn. */
export function cableSize(cable: Cable, drawnCores: number): string {
  const cores = cable.cores ?? drawnCores;
  return cores > 1 ? `${cores}×${cable.csa}` : `${cable.csa} mm²`;
}

export const lengthText = (metres: number): string => `${Number(metres.toFixed(1))} m`;

/** "230 V 50 Hz, TT". */
export const supplyText = (doc: Installation): string =>
  `${doc.supply.voltage} V ${doc.supply.frequency} Hz, ${doc.supply.system}`;
