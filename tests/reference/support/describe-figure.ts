import { CIRCUITS } from '../data/circuits';
import type { Against, Circuit, Figure, Output } from './records';

/** A figure in words, for the name of its test. */

function outputWords(output: Output): string {
  switch (output.of) {
    case 'voltage':
      return `voltage of ${output.node}${output.over === undefined ? '' : ` over ${output.over}`}`;
    case 'sum':
      return `voltages of ${output.nodes.join(' and ')} together`;
    case 'ratio':
      return `voltage of ${output.node} to that of ${output.to}`;
    case 'current':
      return `current of ${output.element}`;
    case 'elementVoltage':
      return `voltage of ${output.element}`;
    case 'power':
      return `power of ${output.elements.join(', ')}`;
    case 'powerShare':
      return `power of ${output.element} to that of ${output.source}`;
    case 'impedance':
      return `impedance at ${output.node}${output.over === undefined ? '' : ` over ${output.over}`}`;
    case 'impedanceSeen':
      return `impedance seen by ${output.element}`;
    case 'reflection':
      return `reflection in ${output.reference} Ω`;
    case 'insertion':
      return `insertion loss in ${output.source} and ${output.load} Ω`;
  }
}

function againstWords(against: Against | undefined): string {
  if (against === undefined || against === 1) return '';
  return typeof against === 'number' ? ` against ${against}` : ` against that at ${against.frequency} Hz`;
}

export function nameOf(figure: Figure): string {
  switch (figure.kind) {
    case 'reading':
      return `${outputWords(figure.output)}, ${figure.read}${againstWords(figure.against)}, at ${figure.frequency} Hz: ${figure.printed}`;
    case 'phasor':
      return outputWords(figure.output);
    case 'exact':
      return `${outputWords(figure.output)} at ${figure.frequency} Hz: ${figure.value.re} + j${figure.value.im}`;
    case 'crossing':
      return `${figure.read} of ${outputWords(figure.output)}${againstWords(figure.against)} passes ${figure.level} at ${figure.printed} Hz`;
    case 'width':
      return `${figure.read} of ${outputWords(figure.output)} passes ${figure.level} ${figure.printed} Hz apart`;
    case 'largest':
    case 'smallest':
      return `${figure.kind} ${figure.read} of ${outputWords(figure.output)}: ${figure.value?.printed ?? ''} at ${figure.at?.printed ?? ''} Hz`;
    case 'poles':
    case 'zeros':
      return `${figure.kind} of the ${outputWords(figure.output)}: ${figure.roots.map(({ re, im }) => `${re.printed} ± j${im.printed}`).join(', ')}`;
    case 'resonance':
      return `quality ${figure.quality.printed} of the ${outputWords(figure.output)}`;
    case 'groupDelay':
      return `group delay of the ${outputWords(figure.output)} at ${figure.frequency} Hz: ${figure.printed} s`;
    case 'noise':
      return `noise of the ${outputWords(figure.output)} from ${figure.from ?? 'all'} at ${figure.frequency} Hz: ${figure.printed}`;
    case 'totalNoise':
      return `noise of the ${outputWords(figure.output)}, all frequencies: ${figure.printed} V`;
    case 'noiseBandwidth':
      return `noise bandwidth of the ${outputWords(figure.output)}: ${figure.printed} Hz`;
    case 'sensitivity':
      return `sensitivity of the ${outputWords(figure.output)} to ${figure.element} at ${figure.frequency} Hz`;
    case 'scattering':
      return `${figure.parameter} in ${figure.reference} Ω at ${figure.frequency} Hz`;
    case 'decay':
      return `node ${figure.node} falls from ${figure.from} to ${figure.to} V in ${figure.printed} s`;
    case 'value':
      return `${figure.element} is ${figure.printed}`;
    case 'greatestPower':
      return `greatest power from ${figure.node}: ${figure.printed} W`;
  }
}

type Titled<F> = readonly [title: string, circuit: Circuit, figures: readonly (readonly [string, F])[]];

/** The circuits that have figures of these kinds, by title, each with those figures by name. */
export function figuresOf<F extends Figure>(kinds: readonly F['kind'][]): readonly Titled<F>[] {
  const isOne = (figure: Figure): figure is F => (kinds as readonly string[]).includes(figure.kind);
  return CIRCUITS.flatMap((circuit): readonly Titled<F>[] => {
    const figures = circuit.figures.filter(isOne).map((figure) => [nameOf(figure), figure] as const);
    const title = `${circuit.id}: ${circuit.title} (${circuit.source})`;
    return figures.length === 0 ? [] : [[title, circuit, figures]];
  });
}
