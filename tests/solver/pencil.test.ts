import { describe, expect, it } from 'vitest';
import type { Element } from '@/solver';
import type { Pencil } from '@/solver/analysis/pencil';
import { pencilOf } from '@/solver/analysis/pencil';
import type { Problem } from '@/solver/analysis/problem';
import { capacitor, currentSource, inductor, resistor, voltageSource } from './support/networks';

function written(result: Pencil | Problem): Pencil {
  if (!result.ok) throw new Error(result.message);
  return result;
}

/** G and C as rows of numbers, and the names of the unknowns. */
function read(pencil: Pencil): { names: string[]; g: number[][]; c: number[][] } {
  const names = pencil.unknowns.map((unknown) => (unknown.quantity === 'voltage' ? `v ${unknown.node}` : `i ${unknown.element}${unknown.port === 0 ? '' : `.${unknown.port}`}`));
  const { size, aRe, bRe } = pencil.stamps.toMatrices(names.length, 1);
  const rows = (entries: Float64Array, sign: number): number[][] =>
    Array.from({ length: size }, (_, i) => Array.from(entries.slice(i * size, (i + 1) * size), (entry) => sign * entry + 0));
  return { names, g: rows(aRe, 1), c: rows(bRe, -1) };
}

describe('the pencil of a network', () => {
  it('has admittances at the nodes, and the currents of sources and inductors', () => {
    const pencil = written(
      pencilOf([voltageSource('V1', '1', '0', 7, 30), resistor('R1', '1', '2', 4), inductor('L1', '2', '3', 0.5), capacitor('C1', '3', '0', 2), currentSource('I1', '3', '0', 1)]),
    );
    expect(read(pencil)).toEqual({
      names: ['v 1', 'v 2', 'v 3', 'i V1', 'i L1'],
      g: [
        [0.25, -0.25, 0, 1, 0],
        [-0.25, 0.25, 0, 0, 1],
        [0, 0, 0, 0, -1],
        [1, 0, 0, 0, 0],
        [0, 1, -1, 0, 0],
      ],
      c: [
        [0, 0, 0, 0, 0],
        [0, 0, 0, 0, 0],
        [0, 0, 2, 0, 0],
        [0, 0, 0, 0, 0],
        [0, 0, 0, 0, -0.5],
      ],
    });
    expect([pencil.unknownOfNode('0'), pencil.unknownOfNode('3'), pencil.unknownOfNode('9')]).toEqual([-1, 2, undefined]);
    expect([pencil.unknownOfPort('L1', 0), pencil.unknownOfPort('R1', 0)]).toEqual([4, undefined]);
  });

  it('makes an unknown of a current that is asked for or sensed', () => {
    const follower: Element = { id: 'CS1', kind: 'currentControlledCurrentSource', nodes: ['2', '0'], sensedElement: 'R1', gain: 3 };
    const pencil = written(pencilOf([resistor('R1', '1', '0', 4), follower, capacitor('C1', '1', '2', 2), resistor('R2', '2', '0', 1)], { currents: [['C1', 0]] }));
    expect(read(pencil)).toEqual({
      names: ['v 1', 'v 2', 'i R1', 'i CS1', 'i C1'],
      g: [
        [0, 0, 1, 0, 1],
        [0, 1, 0, 1, -1],
        [1, 0, -4, 0, 0],
        [0, 0, -3, 1, 0],
        [0, 0, 0, 0, 1],
      ],
      c: [
        [0, 0, 0, 0, 0],
        [0, 0, 0, 0, 0],
        [0, 0, 0, 0, 0],
        [0, 0, 0, 0, 0],
        [-2, 2, 0, 0, 0],
      ],
    });
  });

  it('has the slope of an amplifier’s equation in C, and its output current as unknown', () => {
    const amplifier: Element = { id: 'A1', kind: 'operationalAmplifier', nodes: ['p', '0', 'o'], openLoopGain: 8, gainBandwidth: 1 / Math.PI };
    const { names, g, c } = read(written(pencilOf([resistor('R1', 'p', 'o', 1), resistor('R2', 'p', '0', 1), amplifier])));
    expect(names).toEqual(['v p', 'v o', 'i A1.1']);
    expect(g[2]).toEqual([-1, 0.125, 0]);
    expect(c[2]).toEqual([0, 0.5, 0]);
  });

  it('scales s by the middle of what the elements make', () => {
    const omega = (...elements: readonly Element[]): number => written(pencilOf(elements)).omega;
    expect(omega(resistor('R1', '1', '0', 1024), capacitor('C1', '1', '0', 2 ** -30))).toBe(2 ** 20);
    expect(omega(resistor('R1', '1', '0', 1024), inductor('L1', '1', '0', 2 ** -5))).toBe(2 ** 15);
    expect(omega(capacitor('C1', '1', '0', 2 ** -30), inductor('L1', '1', '0', 2 ** -10))).toBe(2 ** 20);
    expect(omega(resistor('R1', '1', '0', 1024))).toBe(1);
  });

  it('takes only what hangs together with the nodes asked for', () => {
    const elements = [resistor('R1', '1', '0', 1), resistor('R2', '2', '0', 1), capacitor('C2', '2', '3', 1)];
    expect(read(written(pencilOf(elements, { around: ['3'] }))).names).toEqual(['v 2', 'v 3']);
  });

  it('grounds a part of its own at its first node, unless the voltage to the rest is sensed', () => {
    const parts = [resistor('R1', '1', '0', 1), resistor('R2', 'x', 'y', 1)];
    expect(read(written(pencilOf(parts))).names).toEqual(['v 1', 'v y']);
    const sensing: Element = { id: 'CS1', kind: 'voltageControlledCurrentSource', nodes: ['1', '0', 'x', '1'], transconductance: 1 };
    expect(read(written(pencilOf([...parts, sensing]))).names).toEqual(['v 1', 'v x', 'v y', 'i CS1']);
  });
});
