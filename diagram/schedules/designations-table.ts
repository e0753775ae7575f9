import { KIND_NAME } from '../document/kinds';
import { byDesignation, nameOf } from '../document/names';
import { ratingText } from '../commands/rating-text';
import type { Part } from '../document/schema';
import type { Context } from '../rules/context';
import { text } from './figure';
import type { Cell, Column, Row, Table } from './types';

const COLUMNS: readonly Column[] = [
  { id: 'ref', name: 'Designation', width: 9, page: 'stays' },
  { id: 'kind', name: 'What it is', width: 20, page: 'stays', phone: 'rating' },
  { id: 'label', name: 'Name', width: 28, page: 'name' },
  { id: 'rating', name: 'Rating', width: 16, page: 'rating' },
  { id: 'room', name: 'Room', width: 18, page: 'place' },
  { id: 'board', name: 'Switchboard', width: 10, page: 'place' },
];

/** Kinds whose rating is written in one line and can be typed. */
const RATED: ReadonlySet<Part['kind']> = new Set([
  'fuse',
  'meter',
  'isolator',
  'mcb',
  'rcd',
  'rcbo',
  'line-bar',
  'changeover',
  'inverter',
  'battery',
  'socket',
  'lamp',
  'fan',
  'appliance',
]);

/** Every part that a drawing names, in order of designation; joints have no name. */
export function designationsTable({ document }: Context): Table {
  const rowOf = (part: Part): Row => {
    const typed = (field: 'ref' | 'label' | 'rating'): Cell => ({ field: { of: 'part', ids: [part.id], field } });
    return {
      id: part.id,
      name: nameOf(document, part),
      group: '',
      part: part.id,
      parts: [part.id],
      wires: [],
      way: null,
      cells: {
        ref: typed('ref'),
        kind: text(KIND_NAME[part.kind]),
        label: typed('label'),
        rating: RATED.has(part.kind) ? typed('rating') : text(ratingText(part)),
        room: text(document.places.find(({ id }) => id === part.place)?.name ?? ''),
        board: text(part.board ?? ''),
      },
    };
  };
  return {
    id: 'designations',
    title: 'Designations',
    noun: 'parts',
    columns: COLUMNS,
    rows: document.parts
      .filter(({ kind }) => kind !== 'joint')
      .sort(byDesignation)
      .map(rowOf),
    empty: 'No part yet: place the supply on sheet 2.',
  };
}
