import { fork, type ChildProcess } from 'node:child_process';

/** A server of its own process, as it runs in the hall. */
export interface ChildServer {
  child: ChildProcess;
  url: string;
  /** End it as a power cut would, without a chance to tidy up. */
  kill(): Promise<void>;
  stop(): Promise<void>;
}

/**
 * Start a script of ours in a process of its own and wait until it listens.
 * @param script path of a TypeScript file that sends `{ listening }` to its parent
 */
export function startChild(
  script: string,
  env: Record<string, string>,
  args: string[] = [],
): Promise<ChildServer> {
  // Plain node with a loader: a wrapper such as tsx would leave a child behind that holds the port.
  const child = fork(script, args, {
    execArgv: ['--import', 'tsx'],
    env: { ...process.env, ...env },
    stdio: ['ignore', 'ignore', 'inherit', 'ipc'],
  });
  const ended = new Promise<void>((resolve) => child.once('exit', () => resolve()));
  const end = async (signal: NodeJS.Signals) => {
    child.kill(signal);
    await ended;
  };
  return new Promise((resolve, reject) => {
    child.once('exit', (code) => reject(new Error(`${script} ended with ${String(code)}`)));
    child.once('message', (message) => {
      const { listening } = message as { listening: string };
      resolve({
        child,
        url: listening.replace('localhost', '127.0.0.1'),
        kill: () => end('SIGKILL'),
        stop: () => end('SIGTERM'),
      });
    });
  });
}
