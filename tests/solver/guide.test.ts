import { readFileSync } from 'node:fs';
import path from 'node:path';
import { runInNewContext } from 'node:vm';
import { describe, expect, it } from 'vitest';
import * as solver from '@/solver';

/*
 * The guide's examples, run in order in one context. A line `expression; // → text` is held to the text: a word exactly,
 * a number to half a unit of its last digit.
 */
const GUIDE = readFileSync(path.join(import.meta.dirname, '../../solver/GUIDE.md'), 'utf8');

interface Line {
  readonly code: string;
  readonly expected: string;
}

const blocks = [...GUIDE.matchAll(/```ts\n([\s\S]*?)```/g)].map(([, code = '']) => code);

/** Replaces each line with an arrow by a call that notes its value. */
function noting(code: string, lines: Line[]): string {
  return code.replace(/^(.*); \/\/ → (.*)$/gm, (_whole, expression: string, expected: string) => {
    lines.push({ code: expression, expected });
    return `note(${lines.length - 1}, (${expression}));`;
  });
}

/** Half a unit of the last digit that a number is written with. */
function halfUnit(text: string): number {
  const [mantissa = '', exponent = '0'] = text.toLowerCase().split('e');
  const decimals = mantissa.split('.')[1]?.length ?? 0;
  return 0.5 * 10 ** (Number(exponent) - decimals);
}

describe('the guide’s examples', () => {
  const lines: Line[] = [];
  const values = new Map<number, unknown>();
  const program = blocks.map((block) => noting(block, lines)).join('\n');
  runInNewContext(program, { ...solver, Math, note: (line: number, value: unknown) => values.set(line, value) });

  it('are there', () => {
    expect(lines.length).toBeGreaterThan(20);
  });

  it.each(lines.map(({ code, expected }, line) => [code, expected, line] as const))('%s is %s', (_code, expected, line) => {
    const value = values.get(line);
    if (typeof value !== 'number') {
      expect(String(value)).toBe(expected);
      return;
    }
    expect(Math.abs(value - Number(expected)), `${value}`).toBeLessThanOrEqual(halfUnit(expected) * (1 + 1e-9));
  });
});
