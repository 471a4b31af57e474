import { mkdirSync } from 'node:fs';
import path from 'node:path';
import chromium from '@sparticuz/chromium';
import type { TestProject } from 'vitest/node';

declare module 'vitest' {
  interface ProvidedContext {
    chromiumPath: string;
  }
}

/** Unpack the browser of the packages once, beside the other caches of the project; `CHROMIUM_PATH` names another one. */
export default async function unpackBrowser(project: TestProject): Promise<void> {
  const own = process.env.CHROMIUM_PATH;
  if (own) {
    project.provide('chromiumPath', own);
    return;
  }
  const folder = path.resolve('node_modules/.cache/chromium');
  mkdirSync(folder, { recursive: true });
  // The package unpacks into the folder for temporary files and takes what is there already. The folder is named for this
  // one call only: every test of the run sees the same environment.
  const before = process.env.TMPDIR;
  process.env.TMPDIR = folder;
  try {
    project.provide('chromiumPath', await chromium.executablePath());
  } finally {
    if (before === undefined) delete process.env.TMPDIR;
    else process.env.TMPDIR = before;
  }
}
