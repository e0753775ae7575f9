import { readFile, readdir } from 'node:fs/promises';
import path from 'node:path';
import { describe, expect, it } from 'vitest';

const ROOT = path.resolve(import.meta.dirname, '..');

/** The arrow of imports between the top-level folders: what a file of the folder at the left may import with `@/`. */
const MAY_IMPORT: Record<string, readonly string[]> = {
  diagram: [],
  models: ['diagram'],
  'lib/shared': ['diagram'],
  'lib/server': ['lib/shared', 'models', 'diagram'],
  components: ['lib/shared', 'diagram'],
  app: ['components', 'lib/server', 'lib/shared', 'diagram'],
};
/** The same inside diagram. */
const DIAGRAM: Record<string, readonly string[]> = {
  document: [],
  lessons: ['document'],
  symbols: ['document'],
  terminals: ['document', 'symbols'],
  practices: ['document', 'symbols', 'terminals'],
  calculations: ['document', 'symbols', 'terminals', 'practices'],
  circuit: ['document', 'symbols', 'terminals', 'practices', 'calculations'],
  rules: ['document', 'symbols', 'terminals', 'practices', 'calculations', 'circuit'],
  rehearsal: ['document', 'symbols', 'terminals', 'practices', 'calculations', 'circuit'],
  // Colours of cores and what outlets are called stand in the practices, which are data.
  layout: ['document', 'symbols', 'terminals', 'practices'],
  // A draft is placed on the sheet as well.
  survey: ['document', 'symbols', 'terminals', 'practices', 'calculations', 'circuit', 'rules', 'layout'],
  paper: ['document', 'symbols', 'terminals', 'practices', 'layout'],
  commands: [
    'document',
    'symbols',
    'terminals',
    'practices',
    'calculations',
    'circuit',
    'rules',
    'survey',
    'layout',
    'paper',
  ],
  // A schedule reads the home as the rules work it out, and what is typed into it is a command.
  schedules: ['document', 'practices', 'calculations', 'circuit', 'terminals', 'rules', 'layout', 'commands'],
  // What a terminal carries and where a wire may end is said as the commands know it.
  outline: ['document', 'terminals', 'rules', 'layout', 'commands'],
};
const PACKAGES: Record<string, RegExp> = {
  diagram: /^zod$/,
  models: /^(sequelize|zod)$/,
  'lib/shared': /^(zod|idb|react)$/,
};
const IMPORT =
  /^\s*(?:import|export)\s[^'"`;]*?from\s+['"]([^'"]+)['"]|^\s*import\s+['"]([^'"]+)['"]|\bimport\(\s*['"]([^'"]+)['"]/gm;

interface Import {
  file: string;
  from: string;
  of: string;
}

async function importsOf(folder: string): Promise<Import[]> {
  const names = await readdir(path.join(ROOT, folder), { recursive: true }).catch(() => []);
  const files = names.filter((name) => /\.tsx?$/.test(name)).map((name) => path.posix.join(folder, name));
  const found = await Promise.all(
    files.map(async (file) => {
      const text = await readFile(path.join(ROOT, file), 'utf8');
      return [...text.matchAll(IMPORT)].map((match) => ({ file, from: match[1] ?? match[2] ?? match[3]!, of: folder }));
    }),
  );
  return found.flat();
}

const folders = Object.keys(MAY_IMPORT);
const all = (await Promise.all(folders.map(importsOf))).flat();
const show = ({ file, from }: Import) => `${file} imports ${from}`;
/** The top-level folder that an import leads to; undefined for a package. */
const targetOf = ({ file, from }: Import): string | undefined => {
  const place = from.startsWith('@/')
    ? from.slice(2)
    : from.startsWith('.')
      ? path.posix.join(path.posix.dirname(file), from)
      : null;
  if (place === null) return undefined;
  return folders.find((folder) => place === folder || place.startsWith(`${folder}/`)) ?? place;
};

describe('imports', () => {
  it('are read at all', () => {
    expect(all.length).toBeGreaterThan(100);
    for (const folder of folders) expect(all.some(({ of }) => of === folder)).toBe(true);
  });

  it('go one way between the top-level folders', () => {
    const wrong = all.filter((one) => {
      const target = targetOf(one);
      return target !== undefined && target !== one.of && !MAY_IMPORT[one.of]!.includes(target);
    });
    expect(wrong.map(show)).toEqual([]);
  });

  it('never leave a folder by a relative path', () => {
    expect(all.filter((one) => one.from.startsWith('.') && targetOf(one) !== one.of).map(show)).toEqual([]);
  });

  it('take no package into the pure folders', () => {
    const wrong = all.filter(
      (one) => PACKAGES[one.of] && targetOf(one) === undefined && !PACKAGES[one.of]!.test(one.from),
    );
    expect(wrong.map(show)).toEqual([]);
  });

  it('go one way inside diagram', () => {
    const inside = all.filter(({ of }) => of === 'diagram');
    const folderOf = (place: string) => place.split('/')[1]!;
    const wrong = inside.filter(({ file, from }) => {
      if (!from.startsWith('.')) return false;
      const [own, target] = [folderOf(file), folderOf(path.posix.join(path.posix.dirname(file), from))];
      return own !== target && !DIAGRAM[own]?.includes(target);
    });
    expect(wrong.map(show)).toEqual([]);
  });

  it('name server-only first in every module of the server side', async () => {
    const files = [...new Set(all.filter(({ of }) => of === 'lib/server').map(({ file }) => file))];
    const without = [];
    for (const file of files) {
      const text = await readFile(path.join(ROOT, file), 'utf8');
      if (!text.startsWith(`import 'server-only';`)) without.push(file);
    }
    expect(without).toEqual([]);
  });
});
