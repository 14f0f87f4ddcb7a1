import type { ElementDefinition, UnknownFields } from './element-definition';
import { faultOfPositive, firstFault } from './element-definition';
import { REFERENCE_NODE } from './element-list';
import type { OperationalAmplifier } from './element-list';
import type { Coefficient, Law } from './law';
import { constant } from './law';

/**
 * An open port between the inputs, and one between the output and the reference node. Ideal, the output's equation says
 * only that the inputs are at one voltage (a nullator and a norator: Carlin 1964, doi 10.1109/TCT.1964.1082264); else
 * (1 + s·A/(2π·f_T))·(v_out − R_out·i) = A·v_in.
 */
export const operationalAmplifier: ElementDefinition<OperationalAmplifier> = {
  name: 'operational amplifier',
  nodeCount: 3,
  faultOf: (fields) =>
    firstFault(
      faultOfOptional(fields, 'openLoopGain', ''),
      faultOfOptional(fields, 'gainBandwidth', 'hertz'),
      faultOfOutputResistance(fields),
    ),
  ports: ({ nodes: [plus, minus, output] }) => [
    [plus, minus],
    [output, REFERENCE_NODE],
  ],
  laws: (amplifier) => [{ law: 'open' }, outputLaw(amplifier)],
};

function outputLaw({ openLoopGain, gainBandwidth, outputResistance = 0 }: OperationalAmplifier): Law {
  const input = { port: 0, of: 'voltage' } as const;
  if (openLoopGain === undefined && gainBandwidth === undefined) {
    return { law: 'equation', terms: [{ ...input, coefficient: constant(1) }] };
  }
  const angular = 2 * Math.PI * (gainBandwidth ?? Infinity);
  // Divided by the open-loop gain, so that one without bound is the limit and not an exception.
  const constantPart = openLoopGain === undefined ? 0 : 1 / openLoopGain;
  const loss: Coefficient = { constant: constantPart, slope: 1 / angular };
  return {
    law: 'equation',
    terms: [
      { ...input, coefficient: constant(-1) },
      { port: 1, of: 'voltage', coefficient: loss },
      ...(outputResistance === 0
        ? []
        : [{ port: 1, of: 'current', coefficient: scaled(loss, -outputResistance) } as const]),
    ],
  };
}

function scaled({ constant: constantPart, slope }: { constant: number; slope: number }, factor: number): Coefficient {
  return { constant: constantPart * factor, slope: slope * factor };
}

function faultOfOptional(fields: UnknownFields, field: string, unitName: string): string | undefined {
  return fields[field] === undefined ? undefined : faultOfPositive(fields, field, unitName);
}

function faultOfOutputResistance({ outputResistance, openLoopGain, gainBandwidth }: UnknownFields): string | undefined {
  if (outputResistance === undefined || outputResistance === 0) return undefined;
  if (typeof outputResistance !== 'number' || !Number.isFinite(outputResistance) || outputResistance < 0) {
    return 'needs a number of ohms, zero or more, as its output resistance';
  }
  if (openLoopGain !== undefined || gainBandwidth !== undefined) return undefined;
  return 'has an output resistance, which means nothing with a gain without bound; give it an open-loop gain too';
}
