import { spawnSync } from 'node:child_process';
import { cpSync, mkdirSync, mkdtempSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';

/** A small copy of the project, so that a checker can be shown something bad without the project having it. */
let root: string;

beforeEach(() => {
  // Not below node_modules, which the checkers leave alone.
  root = mkdtempSync(path.join(tmpdir(), 'strutbee-tooling-'));
  for (const file of [
    'tsconfig.json',
    'package.json',
    'eslint.config.js',
    '.dependency-cruiser.cjs',
    '.prettierrc.json',
  ]) {
    cpSync(file, path.join(root, file));
  }
  symlinkSync(path.resolve('node_modules'), path.join(root, 'node_modules'));
});
afterEach(() => rmSync(root, { recursive: true, force: true }));

function put(file: string, text: string): void {
  const target = path.join(root, file);
  mkdirSync(path.dirname(target), { recursive: true });
  writeFileSync(target, text);
}

function run(tool: string, args: string[]): { code: number | null; output: string } {
  const done = spawnSync(process.execPath, [path.resolve('node_modules', tool), ...args], {
    cwd: root,
    encoding: 'utf8',
  });
  return { code: done.status, output: `${done.stdout}${done.stderr}` };
}

const cruise = () =>
  run('dependency-cruiser/bin/dependency-cruise.mjs', [
    'shared',
    'server',
    'src',
    '--config',
    '.dependency-cruiser.cjs',
  ]);

/** A tree that keeps every import rule. */
function goodTree(): void {
  put('shared/kernel/ids.ts', 'export const id = 1;\n');
  put('shared/accounts/index.ts', "export { id } from '../kernel/ids';\n");
  put('shared/safety/index.ts', "export { id } from '../accounts';\n");
  put('server/app.ts', "export { a } from './modules/accounts';\n");
  put('server/modules/accounts/index.ts', "export { a } from './a.service';\n");
  put('server/modules/accounts/a.service.ts', 'export const a = 1;\n');
  put('server/modules/people/index.ts', "export { a } from '../accounts';\n");
  put('src/features/bench/a.ts', 'export const a = 1;\n');
  put('src/features/crib/b.ts', 'export const b = 1;\n');
  put('src/lib/c.ts', 'export const c = 1;\n');
}

describe('import rules', () => {
  it('dependency-cruiser > a tree that keeps the rules > passes', () => {
    goodTree();
    expect(cruise()).toMatchObject({ code: 0 });
  });

  it.each([
    ['shared-order-accounts', 'shared/accounts/index.ts', "export { id } from '../safety';\n"],
    ['shared-is-pure', 'shared/safety/x.ts', "import fs from 'node:fs';\nexport const x = fs;\n"],
    ['kernel-knows-nobody', 'shared/kernel/x.ts', "export { id } from '../accounts';\n"],
    ['client-knows-no-server', 'src/lib/x.ts', "export { a } from '../../server/app';\n"],
    ['server-knows-no-client', 'server/http/x.ts', "export { c } from '../../src/lib/c';\n"],
    ['features-are-strangers', 'src/features/bench/x.ts', "export { b } from '../crib/b';\n"],
    ['common-parts-know-no-feature', 'src/lib/x.ts', "export { b } from '../features/crib/b';\n"],
    [
      'modules-meet-at-the-index',
      'server/modules/people/x.ts',
      "export { a } from '../accounts/a.service';\n",
    ],
    [
      'plumbing-meets-modules-at-the-index',
      'server/http/x.ts',
      "export { a } from '../modules/accounts/a.service';\n",
    ],
    [
      'typeorm-stays-in-its-place',
      'server/modules/people/x.service.ts',
      "import { DataSource } from 'typeorm';\nexport const x = DataSource;\n",
    ],
    [
      'express-stays-in-its-place',
      'server/modules/people/x.service.ts',
      "import express from 'express';\nexport const x = express;\n",
    ],
    [
      'sockets-stay-in-their-place',
      'server/modules/people/x.service.ts',
      "import { Server } from 'socket.io';\nexport const x = Server;\n",
    ],
    ['a-folder-on-no-list', 'server/helpers/x.ts', 'export const x = 1;\n'],
    ['a-folder-on-no-list', 'src/features/wishes/x.ts', 'export const x = 1;\n'],
    ['not-to-unresolvable', 'src/lib/x.ts', "export { b } from './nowhere';\n"],
  ])('dependency-cruiser > %s broken in %s > fails and names the rule', (rule, file, text) => {
    goodTree();
    put(file, text);
    const { code, output } = cruise();
    expect(output).toContain(rule);
    expect(code).not.toBe(0);
  });

  it('dependency-cruiser > two files that import each other > fails as a cycle', () => {
    goodTree();
    put('src/lib/x.ts', "import { y } from './y';\nexport const x = () => y;\n");
    put('src/lib/y.ts', "import { x } from './x';\nexport const y = () => x;\n");
    expect(cruise().output).toContain('no-cycles');
  });
});

describe('lint', () => {
  const lint = () => run('eslint/bin/eslint.js', ['.', '--max-warnings', '0', '--ignore-pattern', '*.cjs']);

  it.each([
    ['no-explicit-any', 'shared/kernel/x.ts', '/** X. */\nexport const x = (a: any) => a;\n'],
    ['no-floating-promises', 'server/http/x.ts', 'export const x = () => { Promise.resolve(1); };\n'],
    ['no-console', 'server/http/x.ts', "export const x = () => console.log('x');\n"],
    ['jsdoc/require-jsdoc', 'shared/kernel/x.ts', 'export function x(a: number) {\n  return a;\n}\n'],
    [
      'react-hooks/rules-of-hooks',
      'src/lib/x.tsx',
      "import { useState } from 'react';\nexport function X({ a }: { a: boolean }) {\n  if (a) return null;\n  const [b] = useState(1);\n  return <p>{b}</p>;\n}\n",
    ],
    [
      'switch-exhaustiveness-check',
      'shared/kernel/x.ts',
      "/** X. */\nexport function x(a: 'b' | 'c') {\n  switch (a) {\n    case 'b':\n      return 1;\n  }\n  return 2;\n}\n",
    ],
  ])('eslint > %s > fails and names the rule', (rule, file, text) => {
    put(file, text);
    const { code, output } = lint();
    expect(output).toContain(rule);
    expect(code).toBe(1);
  });
});

describe('format, types, dead code', () => {
  it('prettier > a file with other quotes > fails and names the file', () => {
    put('shared/kernel/x.ts', 'export const x = "x"\n');
    const { code, output } = run('prettier/bin/prettier.cjs', ['--check', 'shared']);
    expect(output).toContain('shared/kernel/x.ts');
    expect(code).toBe(1);
  });

  it('tsc > a number where text is wanted > fails', () => {
    put('shared/kernel/x.ts', 'export const x: string = 1;\n');
    const { code, output } = run('typescript/bin/tsc', [
      '-p',
      '.',
      '--incremental',
      'false',
      '--tsBuildInfoFile',
      'null',
    ]);
    expect(output).toContain('TS2322');
    expect(code).not.toBe(0);
  });

  it('knip > a file nobody imports > fails and names it', () => {
    put('knip.json', '{ "entry": ["server/main.ts"], "project": ["server/**/*.ts"] }');
    put('server/main.ts', 'export {};\n');
    put('server/forgotten.ts', 'export const x = 1;\n');
    const { code, output } = run('knip/bin/knip.js', ['--include', 'files']);
    expect(output).toContain('server/forgotten.ts');
    expect(code).not.toBe(0);
  });
});
