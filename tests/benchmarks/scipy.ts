import { type ChildProcess, spawn, spawnSync } from 'node:child_process';
import { createInterface } from 'node:readline';

/** Milliseconds of single runs: the bare call, and with the ordered corners of each face recovered from its result. */
export interface ScipyTimes {
  readonly bare: readonly number[];
  readonly ordered: readonly number[];
  readonly vertices: number;
}

/** scipy in a process of its own that stays alive, so that both sides can be measured in turns. */
export class Scipy {
  private constructor(
    private readonly child: ChildProcess,
    private readonly lines: AsyncIterator<string>,
    readonly version: string,
  ) {}

  /** Null where no Python with scipy is found. */
  static async start(script: string): Promise<Scipy | null> {
    const python = ['python3', '/usr/bin/python3', 'python'].find(
      (name) => spawnSync(name, ['-c', 'import scipy.spatial'], { stdio: 'ignore' }).status === 0,
    );
    if (!python) return null;
    const child = spawn(python, [script], { stdio: ['pipe', 'pipe', 'inherit'] });
    const lines = createInterface({ input: child.stdout })[Symbol.asyncIterator]();
    const { version } = JSON.parse((await lines.next()).value) as { version: string };
    return new Scipy(child, lines, version);
  }

  /** Times so many runs on a set; its half-spaces [h1, h2, h3, −D] are needed the first time only. */
  async time(name: string, runs: number, halfspaces?: readonly (readonly number[])[]): Promise<ScipyTimes> {
    this.child.stdin?.write(`${JSON.stringify({ name, runs, halfspaces })}\n`);
    return JSON.parse((await this.lines.next()).value) as ScipyTimes;
  }

  stop(): void {
    this.child.stdin?.end();
  }
}
