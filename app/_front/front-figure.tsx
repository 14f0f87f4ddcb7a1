'use client';

import { useMemo, useState } from 'react';
import { Dial } from './dial';
import { FrontBand } from './front-band';
import { FrontDrawing, largestOf } from './front-drawing';
import { FIRST_STEP, frequencyOfStep, PARTS, readingsAt } from './front-network';
import { formatPolar, formatQuantity } from '@/solver';

/** A sheet in small, alive: drag the frequency and every reading turns with it. `response` is in decibels by step. */
export function FrontFigure({ response }: { readonly response: readonly number[] }) {
  const [step, setStep] = useState(FIRST_STEP);
  const frequencyHz = frequencyOfStep(step);
  const readings = useMemo(() => readingsAt(frequencyHz), [frequencyHz]);
  const { out } = readings.voltages;
  const largest = largestOf(Object.values(readings.currents));
  const at = formatQuantity(frequencyHz, 'Hz', 3);
  return (
    <figure className="overflow-hidden rounded-xl border border-rule shadow-float">
      <div className="grid-paper px-3 pt-4 pb-2 sm:px-8 sm:pt-6 sm:pb-3">
        <FrontDrawing
          readings={readings}
          label={`A terminated low-pass network. At ${at} its output is ${formatPolar(out.re, out.im, 'V', 3)}.`}
        />
      </div>
      <ul role="list" className="border-t border-rule bg-raised px-4 py-2 sm:hidden">
        {PARTS.map((part) => {
          const current = readings.currents[part];
          return (
            <li key={part} className="flex items-center gap-3 py-1 text-sm">
              <svg viewBox="0 0 20 20" width="20" height="20" aria-hidden="true">
                <Dial phasor={current} largest={largest} cx={10} cy={10} kind="current" />
              </svg>
              <span className="flex-1 font-semibold">{part}</span>
              <span className="text-current font-mono text-[13px]">{formatPolar(current.re, current.im, 'A', 3)}</span>
            </li>
          );
        })}
      </ul>
      <FrontBand step={step} onStep={setStep} response={response} />
      <figcaption className="border-t border-rule bg-raised px-4 py-2.5 text-[13px] text-muted sm:px-5">
        Phasors: rms, cosine, degrees. Drag the frequency: your browser solves the network as you do.
      </figcaption>
    </figure>
  );
}
