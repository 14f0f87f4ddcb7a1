import { median } from '../figures';

/** Milliseconds of processor time, all threads, that something takes. */
export function processorMs(work: () => void): number {
  const start = process.cpuUsage();
  work();
  const { user, system } = process.cpuUsage(start);
  return (user + system) / 1000;
}

/** Something to be measured: runs so many times, and answers the milliseconds of processor time that all took. */
export type Runner = (times: number) => number | Promise<number>;

export function runner(work: () => void): Runner {
  return (times) =>
    processorMs(() => {
      for (let time = 0; time < times; time++) work();
    });
}

/** A turn is long enough for the clock, and short enough that all of them see the same machine. */
const TURN_MS = 60;
const ROUNDS = 7;

/**
 * Milliseconds a run of each, in turns: every round measures all of them once, and of each the median of seven rounds
 * counts. Each is first run until it takes a turn's time, which also warms it.
 */
export async function compare<Name extends string>(runners: Readonly<Record<Name, Runner>>): Promise<Record<Name, number>> {
  const names = Object.keys(runners) as Name[];
  const times = new Map<Name, number>();
  for (const name of names) {
    let count = 1;
    for (;;) {
      const spent = await runners[name](count);
      if (spent >= TURN_MS) break;
      count = Math.ceil(count * Math.min(10, Math.max(1.5, (1.1 * TURN_MS) / Math.max(spent, 0.01))));
    }
    // Once more, now that it is warm.
    const spent = await runners[name](count);
    times.set(name, Math.max(1, Math.ceil((count * TURN_MS) / Math.max(spent, 0.01))));
  }
  const spent = new Map<Name, number[]>(names.map((name) => [name, []]));
  for (let round = 0; round < ROUNDS; round++) {
    for (const name of names) {
      const count = times.get(name) ?? 1;
      spent.get(name)?.push((await runners[name](count)) / count);
    }
  }
  return Object.fromEntries(names.map((name) => [name, median(spent.get(name) ?? [])])) as Record<Name, number>;
}
