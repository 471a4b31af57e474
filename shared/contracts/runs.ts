/** A long computation as a screen sees it. */
export interface RunView {
  id: string;
  status: 'running' | 'done' | 'stopped' | 'failed';
  /** 0 to 1. */
  share: number;
  /** A few words on what it is doing. */
  note: string;
  /** What it made, once it is done; stopped runs may have made something too. */
  result: unknown;
  /** Why it failed, in words. */
  problem: { code: string; message: string } | null;
}
