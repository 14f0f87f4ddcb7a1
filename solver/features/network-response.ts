import type { ElementList } from '../elements/element-list';
import type { NetworkReading } from '../analysis/network-reading';
import type { Transfer } from '../analysis/poles-and-zeros';
import { polesAndZeros } from '../analysis/poles-and-zeros';
import type { Problem } from '../analysis/problem';
import type { Sweep } from '../analysis/sweep';
import { prepareSweep } from '../analysis/sweep';
import type { SweepTransfer } from '../analysis/sweep-output';
import type { ResonanceHint } from '../analysis/adaptive-frequencies';
import { hintsOf } from './hints';
import type { ResponseFunction } from './response';

/** A response of a network, with hints where its poles and zeros are known. */
export interface NetworkResponse extends Required<ResponseFunction> {
  readonly ok: true;
}

/**
 * An output of a network as a function of the frequency, for the features: `scanResponse(networkResponse(…), band)`. The
 * network is analysed once (see `prepareSweep`); its poles and zeros are looked for when the hints are first asked for.
 * There are none of a network that has no polynomial in s, as one with a line in it.
 */
export function networkResponse(list: ElementList, output: SweepTransfer): NetworkResponse | Problem {
  const prepared = prepareSweep(list, [output]);
  if (!prepared.ok) return prepared;
  const one = new Float64Array(1);
  let last: Sweep | undefined;
  let known: readonly ResonanceHint[] | undefined;
  return {
    ok: true,
    evaluate(frequency) {
      one[0] = frequency;
      const swept = prepared.run(one, { reuse: last });
      if (!swept.ok) return undefined;
      last = swept;
      const [trace] = swept.traces;
      return trace?.determined[0] === 1 ? { re: trace.re[0] ?? 0, im: trace.im[0] ?? 0 } : undefined;
    },
    evaluateAll(frequencies) {
      const swept = prepared.run(frequencies);
      const [trace] = swept.ok ? swept.traces : [];
      const none = (): Float64Array => new Float64Array(frequencies.length);
      return trace ?? { re: none(), im: none(), determined: new Uint8Array(frequencies.length) };
    },
    get hints() {
      return (known ??= hintsFor(list, output));
    },
  };
}

/** Several sources have their poles in common, but the zeros of their sum are not those of each. */
function hintsFor(list: ElementList, output: SweepTransfer): readonly ResonanceHint[] {
  const transfers = transfersOf(list, output);
  return transfers.flatMap(({ transfer, isWhole }) => {
    const found = polesAndZeros(list, transfer);
    if (!found.ok) return [];
    return hintsOf(isWhole ? found : { poles: found.poles, zeros: [] });
  });
}

/** Transfer functions that the output is made of, and whether it is as good as the one, so that its zeros count too. */
function transfersOf(list: ElementList, output: SweepTransfer): readonly { readonly transfer: Transfer; readonly isWhole: boolean }[] {
  switch (output.quantity) {
    case 'impedance':
    case 'admittance':
      return [{ transfer: { kind: 'impedance', nodes: output.nodes }, isWhole: true }];
    case 'ratio':
      return [output.of, output.to].flatMap((reading) => fromSources(list, reading));
    default:
      return fromSources(list, output);
  }
}

/** From each source that delivers at every frequency. */
function fromSources({ elements }: ElementList, output: NetworkReading): readonly { readonly transfer: Transfer; readonly isWhole: boolean }[] {
  const sources = elements.flatMap((element) =>
    (element.kind === 'voltageSource' || element.kind === 'currentSource') && element.value.frequency === null && element.value.rms !== 0
      ? [element.id]
      : [],
  );
  return sources.map((source) => ({ transfer: { kind: 'transfer', source, output }, isWhole: sources.length === 1 }));
}
