import { afterEach, beforeEach, vi } from 'vitest';

/** An error on the console is a failure, unless a test says that it expects one by spying on it itself. */
beforeEach(() => {
  vi.spyOn(console, 'error').mockImplementation((...values: unknown[]) => {
    throw new Error(`console.error: ${values.map(String).join(' ')}`);
  });
});
afterEach(() => {
  vi.restoreAllMocks();
});
