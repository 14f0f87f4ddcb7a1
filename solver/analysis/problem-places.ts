import type { Problem } from './problem';
import type { SweepProblem } from './sweep';

/** Gathers the problems met along a sweep: the same one at several frequencies is one, with its places. */
export class ProblemPlaces {
  private readonly found = new Map<string, { problem: Problem; at: number[] }>();

  /** Two problems are the same when they differ by nothing but the frequency that they name. */
  note(problem: Problem, place: number): void {
    const key = [problem.kind, ...problem.elements, '', ...problem.nodes].join('\n');
    const known = this.found.get(key);
    if (known === undefined) this.found.set(key, { problem, at: [place] });
    else known.at.push(place);
  }

  get list(): readonly SweepProblem[] {
    return [...this.found.values()];
  }

  get first(): Problem | undefined {
    return this.list[0]?.problem;
  }
}
