import { spawn } from 'node:child_process';

export interface RunOptions {
  /** ms after which it is ended. */
  limitMs: number;
  /** Called with each whole line of standard output. */
  onLine?: (line: string) => void;
  signal?: AbortSignal;
  /** What is read from its standard output at the most, bytes. */
  keepBytes?: number;
}

export interface RunResult {
  code: number | null;
  stdout: string;
  stderr: string;
  /** Why it was ended, if it was. */
  ended: 'time' | 'asked' | null;
}

/** Only the end of what a tool complains about is of use. */
const complaintBytes = 8192;

/**
 * Runs a tool without a shell, niced, with no standard input, and ends it when its time is up.
 * @returns what it said; never rejects for a bad exit, only when it cannot be started
 */
export const run = (command: string, args: readonly string[], options: RunOptions): Promise<RunResult> =>
  new Promise((resolve, reject) => {
    const child = spawn('nice', ['-n', '19', command, ...args], { stdio: ['ignore', 'pipe', 'pipe'] });
    let stdout = '';
    let stderr = '';
    let pending = '';
    let ended: RunResult['ended'] = null;
    const end = (why: RunResult['ended']) => {
      ended ??= why;
      child.kill('SIGKILL');
    };
    const timer = setTimeout(() => end('time'), options.limitMs);
    const abort = () => end('asked');
    options.signal?.addEventListener('abort', abort, { once: true });
    if (options.signal?.aborted) abort();
    child.stdout.setEncoding('utf8').on('data', (text: string) => {
      if (stdout.length < (options.keepBytes ?? 1_000_000)) stdout += text;
      if (!options.onLine) return;
      const lines = (pending + text).split('\n');
      pending = lines.pop() ?? '';
      for (const line of lines) options.onLine(line);
    });
    child.stderr.setEncoding('utf8').on('data', (text: string) => {
      stderr = (stderr + text).slice(-complaintBytes);
    });
    const clear = () => {
      clearTimeout(timer);
      options.signal?.removeEventListener('abort', abort);
    };
    child.on('error', (error) => {
      clear();
      reject(error);
    });
    child.on('close', (code) => {
      clear();
      resolve({ code, stdout, stderr, ended });
    });
  });
