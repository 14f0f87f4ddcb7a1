import type { ElementDefinition } from './element-definition';
import { faultOfNumber, firstFault, onePort, twoPorts } from './element-definition';
import type { UnknownFields } from './element-definition';
import type {
  CurrentControlledCurrentSource,
  CurrentControlledVoltageSource,
  VoltageControlledCurrentSource,
  VoltageControlledVoltageSource,
} from './element-list';
import type { Law, Term } from './law';
import { constant } from './law';

/** The own quantity of the first port equals a coefficient times something sensed. */
function follows(of: Term['of'], sensed: Pick<Term, 'port' | 'of'>, coefficient: number): Law {
  return {
    law: 'equation',
    terms: [
      { port: 0, of, coefficient: constant(1) },
      { ...sensed, coefficient: constant(-coefficient) },
    ],
  };
}

function faultOfSensed({ sensedElement }: UnknownFields): string | undefined {
  if (typeof sensedElement === 'string' && sensedElement.length > 0) return undefined;
  return 'needs the id of an element as its sensed element';
}

/** v = gain·v_sense; the sensing port is open. */
export const voltageControlledVoltageSource: ElementDefinition<VoltageControlledVoltageSource> = {
  name: 'voltage-controlled voltage source',
  nodeCount: 4,
  faultOf: (fields) => faultOfNumber(fields, 'gain', ''),
  ports: twoPorts,
  laws: ({ gain }) => [follows('voltage', { port: 1, of: 'voltage' }, gain), { law: 'open' }],
};

/** i = transconductance·v_sense; the sensing port is open. */
export const voltageControlledCurrentSource: ElementDefinition<VoltageControlledCurrentSource> = {
  name: 'voltage-controlled current source',
  nodeCount: 4,
  faultOf: (fields) => faultOfNumber(fields, 'transconductance', 'siemens'),
  ports: twoPorts,
  laws: ({ transconductance }) => [
    follows('current', { port: 1, of: 'voltage' }, transconductance),
    { law: 'open' },
  ],
};

/** v = transresistance·i of the sensed element. */
export const currentControlledVoltageSource: ElementDefinition<CurrentControlledVoltageSource> = {
  name: 'current-controlled voltage source',
  nodeCount: 2,
  faultOf: (fields) => firstFault(faultOfSensed(fields), faultOfNumber(fields, 'transresistance', 'ohms')),
  ports: onePort,
  laws: ({ sensedElement, transresistance }) => [
    follows('voltage', { port: { element: sensedElement }, of: 'current' }, transresistance),
  ],
};

/** i = gain·i of the sensed element. */
export const currentControlledCurrentSource: ElementDefinition<CurrentControlledCurrentSource> = {
  name: 'current-controlled current source',
  nodeCount: 2,
  faultOf: (fields) => firstFault(faultOfSensed(fields), faultOfNumber(fields, 'gain', '')),
  ports: onePort,
  laws: ({ sensedElement, gain }) => [follows('current', { port: { element: sensedElement }, of: 'current' }, gain)],
};
