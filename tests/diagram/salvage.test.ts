import fc from 'fast-check';
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readWhatCan } from '@/diagram/document/salvage';
import { readDocument, type Installation } from '@/diagram/document/schema';
import { buildScene } from '@/diagram/layout/build-scene';
import { examine } from '@/diagram/rules/examine';

const text = readFileSync('tests/fixtures/homes/clean-flat.json', 'utf8');
const whole = readDocument(JSON.parse(text));
if (!whole.ok) throw new Error('the sample does not open');
const home = whole.document;
/** The sample as loose data, as a file may be. */
type Loose = Record<string, unknown> & { parts: unknown[]; wires: unknown[] };
const broken = (change: (file: Loose) => void) => {
  const file = JSON.parse(text) as Loose;
  change(file);
  return readWhatCan(file);
};
const ids = (list: readonly { id: string }[]) => list.map(({ id }) => id);

describe('a file that is no whole drawing', () => {
  it('is read as it is where nothing is wrong with it', () => {
    expect(readWhatCan(JSON.parse(text))).toEqual({ document: home, errors: [] });
  });

  it('leaves out the part it does not know, says which and where, and keeps the rest', () => {
    const at = (JSON.parse(text) as Installation).parts.findIndex(({ kind }) => kind === 'lamp');
    const lamp = (JSON.parse(text) as Installation).parts[at]!.id;
    const { document, errors } = broken((file) => {
      (file.parts[at] as { kind: string }).kind = 'warp drive';
      file.wires.push({ id: 'w', from: 7 });
    });
    expect(ids(document.parts)).toEqual(ids(home.parts).filter((id) => id !== lamp));
    expect(ids(document.wires)).toEqual(ids(home.wires));
    expect(errors[0]).toMatchObject({ path: `parts.${at}.kind` });
    expect(errors[0]!.message).toContain(`: ${lamp} is left out of what is shown`);
    expect(errors.some(({ path }) => path.startsWith(`wires.${home.wires.length}.from`))).toBe(true);
  });

  it('tells of an id used twice by its place in the file, though something before it was left out', () => {
    const { document, errors } = broken((file) => {
      const [first] = file.parts as Installation['parts'];
      file.parts = [{ id: 'odd', kind: 'warp drive' }, ...file.parts, first];
    });
    expect(document.parts).toEqual(home.parts);
    const last = home.parts.length + 1;
    expect(errors.map(({ path }) => path)).toEqual(['parts.0.kind', `parts.${last}.id`]);
  });

  it('is read where a later version wrote it: what this one does not know is named', () => {
    const { document, errors } = broken((file) => {
      file.schema = 2;
      file.weather = 'fair';
      (file.parts[0] as Record<string, unknown>).torque = 2.5;
    });
    expect(document).toEqual(home);
    expect(errors.map(({ path }) => path).sort()).toEqual(['(file)', 'parts.0', 'schema']);
    expect(errors.map(({ message }) => message).join()).toContain('torque');
  });

  it('keeps its home where its positions, its supply or its lists are spoilt', () => {
    const { document } = broken((file) => {
      file.sheet = { overview: { [home.parts[0]!.id]: { x: 0.5, y: 0 } }, connections: 'nowhere' };
      file.supply = { ...(file.supply as object), voltage: -1, ze: 'low' };
      file.notices = 4;
    });
    expect(document.parts).toEqual(home.parts);
    expect(document.supply.voltage).toBe(230);
  });

  it.each([null, 7, 'home', [], {}, { parts: {}, sheet: 4, supply: null }])('never throws: %o', (data) => {
    const { document, errors } = readWhatCan(data);
    expect(readDocument(document).ok).toBe(true);
    expect(errors.length).toBeGreaterThan(0);
  });

  it('opens, is drawn and is examined whatever one value is spoilt (property)', () => {
    const paths: (string | number)[][] = [];
    const walk = (value: unknown, path: (string | number)[]) => {
      if (path.length > 0) paths.push(path);
      if (value && typeof value === 'object')
        for (const key of Object.keys(value)) walk((value as Record<string, unknown>)[key], [...path, Array.isArray(value) ? Number(key) : key]);
    };
    walk(JSON.parse(text), []);
    fc.assert(
      fc.property(fc.constantFrom(...paths), fc.constantFrom(null, -3, 'x', {}, [], undefined), (path, value) => {
        const file = JSON.parse(text);
        const holder = path.slice(0, -1).reduce((inner, key) => inner[key], file);
        if (value === undefined) delete holder[path.at(-1)!];
        else holder[path.at(-1)!] = value;
        const { document } = readWhatCan(file);
        expect(readDocument(document).ok).toBe(true);
        expect(document.parts.length).toBeGreaterThanOrEqual(path[0] === 'parts' ? (path.length === 1 ? 0 : home.parts.length - 1) : home.parts.length);
        buildScene(document, 'overview');
        examine(document);
      }),
      { numRuns: 60 },
    );
  });
});
