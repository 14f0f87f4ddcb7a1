'use client';

import { formatPolar, formatQuantity, formatRectangular, type ElementKind } from '@/solver';
import { classNames } from '@/components/class-names';
import type { Part } from '../../document/types';
import { conventionAt, formatReading, withoutRounding, type ReadingConvention } from '../../network/format-reading';
import { impedanceOf, type ElementImpedance } from '../../network/impedance';
import { magnitude, type Phasor } from '../../network/phasor';
import { powerFactor } from '../../network/power-factor';
import { angularFrequency, timeFunction, type CopiedText } from '../../network/time-function';
import { CopyButton } from '../figures/copy-button';
import { formatHertz } from '../figures/echo';
import { useSheet } from '../sheet-context';
import { FigureLine, figureTones, type FigureTone } from './figure-line';
import { WarningLine } from './warning-line';

/** The Ledger has room for a digit more than the drawing. */
const DIGITS = 4;

/** What is read of one part: phasors, what it is at this frequency, powers, and its time functions. */
export function PartReadings({ part }: { readonly part: Part }) {
  const reading = useSheet((state) => state.readings.parts.get(part.id));
  const element = useSheet((state) => state.readings.network.elementOfPart.get(part.id));
  const isDead = useSheet((state) => state.readings.deadSources.includes(part.id));
  const frequencyHz = useSheet((state) => state.readings.frequencyHz);
  const sheetConvention = useSheet((state) => state.document.convention);
  if (!element) return null;

  const convention = conventionAt(sheetConvention, frequencyHz);
  const impedance = impedanceOf(element, frequencyHz);
  const { current = null, voltage = null, power = null } = reading ?? {};
  return (
    <div className="mt-2 flex flex-col gap-2">
      {isDead && 'value' in element && element.value.frequency !== null && (
        <WarningLine>
          Its own frequency is {formatHertz(element.value.frequency)}: dead at {formatHertz(frequencyHz)}.
        </WarningLine>
      )}
      <dl className="flex flex-col">
        <FigureLine label="Current" tone="current" figures={current && [formatReading(current, 'A', convention, DIGITS)]} />
        <FigureLine label="Voltage" tone="voltage" figures={voltage && [formatReading(voltage, 'V', convention, DIGITS)]} />
        {impedance && <FigureLine label="Impedance" figures={impedanceFigures(impedance)} />}
        <PowerLines power={power} convention={convention} />
      </dl>
      {current && voltage && <TimeFunctions current={current} voltage={voltage} frequencyHz={frequencyHz} />}
      <p className="text-[12px] leading-4 text-balance text-muted">
        Current enters {entryWords(element.kind)}; a positive <i>P</i> is absorbed.
      </p>
    </div>
  );
}

/** Which of its pins gives the current and the voltage of a part their signs. */
function entryWords(kind: ElementKind): string {
  switch (kind) {
    case 'voltageSource':
      return 'at plus';
    case 'currentSource':
      return 'where the arrow begins';
    default:
      return 'at the first pin';
  }
}

function impedanceFigures(impedance: ElementImpedance): readonly string[] {
  switch (impedance.kind) {
    case 'ohms': {
      const { re, im } = impedance.ohms;
      return [formatRectangular(re, im, 'Ω', DIGITS), formatPolar(re, im, 'Ω', DIGITS)];
    }
    case 'open':
      return ['open'];
    case 'closed':
      return ['closed: 0 Ω'];
  }
}

type PowerLinesProps = { readonly power: Phasor | null; readonly convention: ReadingConvention };

function PowerLines({ power, convention }: PowerLinesProps) {
  if (power === null || convention === 'direct') {
    const figures = power && [formatQuantity(withoutRounding(power).re, 'W', DIGITS)];
    return <FigureLine label={<QuantitySymbols symbols={['P']} />} tone="power" figures={figures} />;
  }
  const { re, im } = withoutRounding(power);
  const factor = powerFactor(power);
  return (
    <>
      <FigureLine
        label={<QuantitySymbols symbols={['P', 'Q']} />}
        tone="power"
        figures={[`${formatQuantity(re, 'W', DIGITS)}, ${formatQuantity(im, 'var', DIGITS)}`]}
      />
      <FigureLine label={<QuantitySymbols symbols={['S']} />} tone="power" figures={[formatQuantity(magnitude(power), 'VA', DIGITS)]} />
      <FigureLine
        label="Power factor"
        tone="power"
        figures={[factor === null ? 'none: no power' : [formatQuantity(factor.value, '', DIGITS), factor.sense].filter(Boolean).join(' ')]}
      />
    </>
  );
}

/** Symbols of quantities are italic (ISO 80000-1). */
function QuantitySymbols({ symbols }: { readonly symbols: readonly string[] }) {
  return (
    <>
      Power{' '}
      {symbols.map((symbol, index) => (
        <span key={symbol}>
          {index > 0 && ', '}
          <i>{symbol}</i>
        </span>
      ))}
    </>
  );
}

type TimeFunctionsProps = { readonly current: Phasor; readonly voltage: Phasor; readonly frequencyHz: number };

function TimeFunctions({ current, voltage, frequencyHz }: TimeFunctionsProps) {
  return (
    <div className="rounded-md bg-sunken py-1 pr-0.5 pl-2">
      <TimeLine text={timeFunction('i', current, 'A', frequencyHz)} tone="current" copyLabel="Copy i(t) with all digits" />
      <TimeLine text={timeFunction('u', voltage, 'V', frequencyHz)} tone="voltage" copyLabel="Copy u(t) with all digits" />
      {frequencyHz > 0 && <TimeLine text={angularFrequency(frequencyHz)} tone="plain" copyLabel="Copy ω with all digits" />}
    </div>
  );
}

function TimeLine({ text, tone, copyLabel }: { readonly text: CopiedText; readonly tone: FigureTone; readonly copyLabel: string }) {
  return (
    <div className="flex min-h-6 items-center">
      <span className={classNames('min-w-0 flex-1 font-mono text-[11.5px] leading-4 tabular-nums', figureTones[tone])}>{text.shown}</span>
      <CopyButton label={copyLabel} text={() => text.full} />
    </div>
  );
}
