/** A long computation as a screen sees it. */
export interface RunView {
  id: string;
  /** `stopping`: somebody asked it to stop, and it ends within a second. */
  status: 'running' | 'stopping' | 'done' | 'stopped' | 'failed';
  /** 0 to 1. */
  share: number;
  /** A few words on what it is doing. */
  note: string;
  /** What it made, once it is done; stopped runs may have made something too. */
  result: unknown;
  /** Why it failed, in words. */
  problem: { code: string; message: string } | null;
}
