import { readdirSync, readFileSync, statSync } from 'node:fs';
import { dirname, join, relative, resolve } from 'node:path';
import { describe, expect, it } from 'vitest';

const ROOT = resolve(import.meta.dirname, '../..');
const FOLDERS = ['shared', 'server', 'src'];

const filesIn = (folder: string): string[] =>
  readdirSync(folder).flatMap((name) => {
    const path = join(folder, name);
    if (statSync(path).isDirectory()) return filesIn(path);
    return /\.(ts|tsx|mts)$/.test(name) ? [path] : [];
  });

interface Source {
  file: string;
  /** Files of the project, relative to its root, and packages by name. */
  imports: string[];
  isTest: boolean;
}

const IMPORT = /(?:import|export)\s[^'"]*?from\s+'([^']+)'|import\s+'([^']+)'|import\('([^']+)'\)/g;

const read = (path: string): Source => {
  const file = relative(ROOT, path);
  const text = readFileSync(path, 'utf8');
  const imports = [...text.matchAll(IMPORT)].map((match) => {
    const target = match[1] ?? match[2] ?? match[3] ?? '';
    return target.startsWith('.')
      ? relative(ROOT, resolve(dirname(path), target.split('?')[0] ?? ''))
      : target;
  });
  return { file, imports, isTest: /\.test\.tsx?$/.test(file) };
};

const sources = FOLDERS.flatMap((folder) => filesIn(join(ROOT, folder))).map(read);
const product = sources.filter((source) => !source.isTest);
const importsOf = (source: Source) => source.imports.map((target) => `${source.file} -> ${target}`);

/** Import lines of files that match `from` and point to something that matches `to`. */
const offences = (from: RegExp, to: RegExp, except: RegExp = /$^/): string[] =>
  product
    .filter((source) => from.test(source.file) && !except.test(source.file))
    .flatMap(importsOf)
    .filter((line) => to.test(line.split(' -> ')[1] ?? ''));

describe('who may import whom', () => {
  it('shared is pure: no Node, no DOM library, no framework', () => {
    expect(
      offences(/^shared\//, /^(node:|react|express|@mikro-orm|luxon|leaflet|server\/|src\/)/),
    ).toEqual([]);
  });

  it('shared/units, time and vector import nothing else', () => {
    expect(offences(/^shared\/(units|time|vector)\.ts$/, /./)).toEqual([]);
  });

  it('orbit and array use units, time and vector; link may use both; schedule all of these', () => {
    const base = 'shared\\/(units|time|vector)\\.ts';
    expect(
      offences(/^shared\/orbit\//, new RegExp(`^(?!${base}|shared/orbit/|satellite\\.js)`)),
    ).toEqual([]);
    expect(offences(/^shared\/array\//, new RegExp(`^(?!${base}|shared/array/)`))).toEqual([]);
    expect(
      offences(/^shared\/link\//, /^(?!shared\/(units|time|vector|orbit|array|link))/),
    ).toEqual([]);
    expect(offences(/^shared\/schedule\//, /^shared\/(schemas|policy)/)).toEqual([]);
  });

  it('schemas and policy never import the computation', () => {
    expect(offences(/^shared\/(schemas\/|policy)/, /^shared\/(orbit|array|link|schedule)/)).toEqual(
      [],
    );
  });

  it('server and src do not know each other', () => {
    expect(offences(/^server\//, /^src\//)).toEqual([]);
    expect(offences(/^src\//, /^server\//)).toEqual([]);
  });

  it('a feature never imports another feature', () => {
    const crossing = product.flatMap(importsOf).filter((line) => {
      const [from = '', to = ''] = line.split(' -> ');
      const own = /^src\/features\/([^/]+)\//.exec(from)?.[1];
      const other = /^src\/features\/([^/]+)\//.exec(to)?.[1];
      return own !== undefined && other !== undefined && own !== other;
    });
    expect(crossing).toEqual([]);
  });

  it('only one file imports satellite.js, and only one of the client calls fetch', () => {
    const users = product.filter((source) => source.imports.includes('satellite.js'));
    expect(users.map((source) => source.file)).toEqual(['shared/orbit/propagation.ts']);
    const callers = product
      .filter((source) => source.file.startsWith('src/'))
      .filter((source) => /(?<![.\w])fetch\(/.test(readFileSync(join(ROOT, source.file), 'utf8')));
    expect(callers.map((source) => source.file)).toEqual(['src/lib/api-client.ts']);
  });

  it('only routes, middleware and the app know Express', () => {
    expect(
      offences(
        /^server\//,
        /^express(-rate-limit)?$/,
        /(\.routes\.ts|^server\/middleware\/.*|^server\/app\.ts)$/,
      ),
    ).toEqual([]);
  });

  it('workers, solver and the independent check never open the database', () => {
    expect(
      offences(/^server\/(workers|solver|verify)\//, /@mikro-orm|server\/modules|server\/orm/),
    ).toEqual([]);
  });

  it('the independent check uses neither facts nor rules', () => {
    expect(offences(/^server\/verify\//, /^shared\/schedule\/(facts|rules)/)).toEqual([]);
  });

  it('services and pure code take the clock from their dependencies', () => {
    const late = product
      .filter((source) => /^(shared\/|server\/modules\/)/.test(source.file))
      .filter((source) =>
        /Date\.now\(\)|new Date\(\)/.test(
          readFileSync(join(ROOT, source.file), 'utf8').replace(/\/\*[\s\S]*?\*\/|\/\/.*/g, ''),
        ),
      );
    expect(late.map((source) => source.file)).toEqual([]);
  });
});

/** From left to right; a module uses itself and what stands to its left. */
const LINE = [
  'users',
  'sessions',
  'audit',
  'mail',
  'runs',
  'stations',
  'missions',
  'satellites',
  'element-sets',
  'passes',
  'plans',
  'exports',
];
/** Accounts and what is kept about everybody stand together at the left end. */
const rank = (module: string): number => Math.max(4, LINE.indexOf(module));

describe('the line of modules', () => {
  it('an entity or service imports only from itself and from its left', () => {
    const wrong = product
      .filter((source) => /^server\/modules\//.test(source.file))
      .flatMap(importsOf)
      .filter((line) => {
        const [from = '', to = ''] = line.split(' -> ');
        const own = /^server\/modules\/([^/]+)\//.exec(from)?.[1];
        const other = /^server\/modules\/([^/]+)\//.exec(to)?.[1];
        return own !== undefined && other !== undefined && rank(other) > rank(own);
      });
    expect(wrong).toEqual([]);
  });

  it('names every module', () => {
    expect(
      readdirSync(join(ROOT, 'server/modules')).filter((name) => !LINE.includes(name)),
    ).toEqual([]);
  });
});

describe('cycles', () => {
  it('there are none', () => {
    const graph = new Map(product.map((source) => [source.file, source.imports]));
    const done = new Set<string>();
    const cycles: string[] = [];
    const visit = (file: string, path: string[]): void => {
      if (path.includes(file)) {
        cycles.push([...path.slice(path.indexOf(file)), file].join(' -> '));
        return;
      }
      if (done.has(file)) return;
      for (const next of graph.get(file) ?? []) if (graph.has(next)) visit(next, [...path, file]);
      done.add(file);
    };
    for (const file of graph.keys()) visit(file, []);
    expect(cycles).toEqual([]);
  });
});

describe('the root of the project', () => {
  it('holds the entries it is meant to hold', () => {
    const entries = readdirSync(ROOT).filter((name) => !name.startsWith('.'));
    const made = ['node_modules', 'dist', 'data', 'coverage'];
    expect(entries.filter((name) => !made.includes(name)).sort()).toEqual(
      [
        'DEVELOPERS.md',
        'README.md',
        'eslint.config.js',
        'index.html',
        'mikro-orm.config.ts',
        'package-lock.json',
        'package.json',
        'server',
        'shared',
        'src',
        'tailwind.config.ts',
        'tests',
        'tle',
        'tsconfig.json',
        'vite.config.ts',
      ].sort(),
    );
  });
});
