import { describe, expect, it } from 'vitest';
import type { Level, Part, Value } from '@/solver/tape/tape-builder';
import { LEVEL, negative, TapeBuilder, timesJ } from '@/solver/tape/tape-builder';
import type { TapeMachine } from '@/solver/tape/tape-machine';
import { plainMachine, vectorMachine } from '@/solver/tape/tape-machine';
import { compileTape } from '@/solver/tape/tape-program';
import { Random } from './support/random';

interface Number2 {
  readonly re: number;
  readonly im: number;
}

/** A random program, written down on a tape and computed beside it, lane by lane, with plain complex numbers. */
function randomProgram(seed: number, length: number, lanes: number) {
  const random = new Random(seed);
  const builder = new TapeBuilder();
  const inputs: { part: Part; level: Level; lanes: Float64Array }[] = [];
  const values: { value: Value; lanes: readonly Number2[] }[] = [];
  const number = (): number => random.pick([-1, 1]) * random.between(0.5, 2);
  const input = () => {
    const level = random.pick([LEVEL.constant, LEVEL.block, LEVEL.varying]);
    const part = builder.input(level);
    const made = { part, level, lanes: Float64Array.from({ length: lanes }, number) };
    inputs.push(made);
    return made;
  };
  for (let count = 0; count < 8; count++) {
    const re = random.next() < 0.7 ? input() : undefined;
    const im = random.next() < 0.7 ? input() : undefined;
    values.push({
      value: { re: re?.part ?? 0, im: im?.part ?? 0 },
      lanes: Array.from({ length: lanes }, (_, lane) => ({ re: re?.lanes[lane] ?? 0, im: im?.lanes[lane] ?? 0 })),
    });
  }
  values.push({ value: builder.constant(1), lanes: Array.from({ length: lanes }, () => ({ re: 1, im: 0 })) });
  values.push({ value: builder.constant(0, -3), lanes: Array.from({ length: lanes }, () => ({ re: 0, im: -3 })) });
  const product = (a: Number2, b: Number2): Number2 => ({ re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re });
  const total = (a: Number2, b: Number2): Number2 => ({ re: a.re + b.re, im: a.im + b.im });
  const minus = (a: Number2): Number2 => ({ re: -a.re, im: -a.im });
  for (let step = 0; step < length; step++) {
    const [a, b, c] = [random.pick(values), random.pick(values), random.pick(values)];
    const each = (of: (x: Number2, y: Number2, z: Number2) => Number2): readonly Number2[] =>
      a.lanes.map((x, lane) => of(x, b.lanes[lane] ?? x, c.lanes[lane] ?? x));
    const kind = random.whole(0, 7);
    let made: { value: Value; lanes: readonly Number2[] };
    if (kind === 0) made = { value: builder.add(a.value, b.value), lanes: each(total) };
    else if (kind === 1) made = { value: builder.sub(a.value, b.value), lanes: each((x, y) => total(x, minus(y))) };
    else if (kind === 2) made = { value: builder.mul(a.value, b.value), lanes: each(product) };
    else if (kind === 3) {
      made = { value: builder.mulAdd(c.value, a.value, b.value), lanes: each((x, y, z) => total(z, product(x, y))) };
    } else if (kind === 4) {
      made = { value: builder.mulSub(c.value, a.value, b.value), lanes: each((x, y, z) => total(z, minus(product(x, y)))) };
    } else if (kind === 5) {
      made = { value: builder.sum([a.value, b.value, c.value]), lanes: each((x, y, z) => total(total(x, y), z)) };
    } else if (kind === 6) made = { value: negative(timesJ(a.value)), lanes: each((x) => ({ re: x.im, im: -x.re })) };
    else {
      if (a.lanes.some(({ re, im }) => re * re + im * im < 0.01)) continue;
      made = {
        value: builder.reciprocal(a.value, random.next() < 0.5 ? builder.squares([a.value]) : undefined),
        lanes: each(({ re, im }) => ({ re: re / (re * re + im * im), im: -im / (re * re + im * im) })),
      };
    }
    // Values grow without bound else, and rounding with them.
    if (made.lanes.every(({ re, im }) => Math.hypot(re, im) < 50)) values.push(made);
  }
  const outputs = values.slice(-5);
  const parts = outputs.flatMap(({ value }) => [value.re, value.im]);
  return { inputs, outputs, program: compileTape(builder, parts) };
}

function run(machine: TapeMachine, { inputs, outputs, program }: ReturnType<typeof randomProgram>, lanes: number): Number2[][] {
  const memory = machine.load(program, lanes);
  const fill = (level: Level): void => {
    for (const { part, level: of, lanes: numbers } of inputs) {
      const slot = program.slotOf(part);
      if (slot >= 0 && of === level) memory.set(numbers, slot * lanes);
    }
    machine.run(level);
  };
  // What a level leaves behind must not reach into its next run.
  for (const level of [LEVEL.constant, LEVEL.block, LEVEL.varying, LEVEL.varying, LEVEL.block, LEVEL.varying]) fill(level);
  const read = (part: Part, lane: number): number =>
    part === 0 ? 0 : Math.sign(part) * (memory[program.slotOf(part) * lanes + lane] ?? NaN);
  return outputs.map(({ value }) => Array.from({ length: lanes }, (_, lane) => ({ re: read(value.re, lane), im: read(value.im, lane) })));
}

describe('a tape', () => {
  it('computes what the program says, on either machine, the same to the last bit', () => {
    const plain = plainMachine();
    const vector = vectorMachine();
    expect(vector).toBeDefined();
    let compared = 0;
    for (let seed = 1; seed <= 300; seed++) {
      const lanes = seed % 3 === 0 ? 64 : 8;
      const made = randomProgram(seed, 60, lanes);
      const results = run(plain, made, lanes);
      for (const [place, { lanes: expected }] of made.outputs.entries()) {
        for (const [lane, { re, im }] of expected.entries()) {
          const off = Math.hypot((results[place]?.[lane]?.re ?? NaN) - re, (results[place]?.[lane]?.im ?? NaN) - im);
          expect(off, `seed ${seed}`).toBeLessThanOrEqual(1e-9);
          compared += 1;
        }
      }
      if (vector !== undefined) expect(run(vector, made, lanes), `seed ${seed}`).toEqual(results);
    }
    expect(compared).toBeGreaterThan(10_000);
  });
});
