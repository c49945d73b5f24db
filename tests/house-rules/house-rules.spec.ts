import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { basename, resolve } from 'node:path';

const workspace = resolve(__dirname, '../..');
const files = execFileSync('git', ['ls-files', '-z', '--cached', '--others', '--exclude-standard'], {
  cwd: workspace,
})
  .toString()
  .split('\0')
  .filter((file) => file !== '');
const sources = files.filter((file) => /\.(ts|mjs|cjs|html|scss)$/.test(file));
const typescript = sources.filter((file) => file.endsWith('.ts'));
const read = (file: string): string => readFileSync(resolve(workspace, file), 'utf8');

/** Paths of the sources in which a line matches, with its number. */
function findLines(pattern: RegExp, among: readonly string[] = sources): string[] {
  return among
    .filter((file) => !file.startsWith('tests/house-rules/'))
    .flatMap((file) =>
      read(file)
        .split('\n')
        .flatMap((line, index) => (pattern.test(line) ? [`${file}:${index + 1}`] : [])),
    );
}

describe('house rules', () => {
  it('keeps the top level to the agreed set', () => {
    const allowed = new Set([
      'README.md',
      'DEVELOPERS.md',
      'LICENSE',
      'package.json',
      'package-lock.json',
      'nx.json',
      'tsconfig.base.json',
      'apps',
      'libs',
      'migrations',
      'tools',
      'tests',
    ]);
    const top = new Set(files.map((file) => file.split('/')[0] ?? ''));
    expect([...top].filter((name) => !name.startsWith('.') && !allowed.has(name))).toEqual([]);
  });

  it('names source files in kebab-case after what they hold, never after a drawer', () => {
    const odd = sources.filter((file) => !/^[a-z0-9]+([-.][a-z0-9]+)*$/.test(basename(file)));
    const drawers = sources.filter((file) => /^(utils?|helpers?|common|misc|shared)\./.test(basename(file)));
    expect([...odd, ...drawers]).toEqual([]);
  });

  it('keeps a source file to one thing: at most 400 lines', () => {
    const long = sources.filter((file) => !/\.spec\.ts$/.test(file) && read(file).split('\n').length > 400);
    expect(long).toEqual([]);
  });

  it('leaves no to-do marks, focused tests or debugger statements behind', () => {
    expect(findLines(/\b(TODO|FIXME|XXX|HACK)\b|\b(it|describe|test)\.only\(|^\s*debugger;/)).toEqual([]);
  });

  it('lets only values make decimals, and only database and migrations speak SQL', () => {
    const decimal = findLines(/from 'decimal\.js'/).filter((at) => !at.startsWith('libs/values/'));
    const pg = findLines(/from 'pg'/).filter(
      (at) => !at.startsWith('libs/database/') && !at.startsWith('tests/') && !at.startsWith('apps/api/'),
    );
    expect([...decimal, ...pg]).toEqual([]);
  });

  it('has migrations in order, each listed in the index, importing kysely alone', () => {
    const migrations = files.filter((file) => /^migrations\/\d{12}-[a-z-]+\.ts$/.test(file)).sort();
    const index = read('migrations/index.ts');
    expect(migrations.length).toBeGreaterThan(0);
    const listed = [...index.matchAll(/'\.\/(\d{12}-[a-z-]+)'/g)].map((match) => `migrations/${match[1]}.ts`);
    expect(listed).toEqual(migrations);
    expect(findLines(/^import .* from '(?!kysely')/, migrations)).toEqual([]);
  });

  it('never reads a date of work with the clock of the machine', () => {
    const local = findLines(/\.(getFullYear|getMonth|getDate|getHours|getDay)\(\)/);
    expect(local).toEqual([]);
  });

  it('says why wherever it gives up on types', () => {
    expect(findLines(/(: any\b|as any\b|<any>|@ts-ignore)/, typescript)).toEqual([]);
  });
});
