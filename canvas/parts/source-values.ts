import type { SourceValue } from '@/solver';
import { formatQuantity, parseQuantity } from '@/solver';
import type { FieldDefinition, PartValues } from './definition';
import { readAngle, readFrequency } from './read-values';

/*
 * What both kinds of independent source share. A person types the amplitude as peak, rms or peak to peak, the phase
 * on a cosine or a sine; the element list holds one form: rms, cosine (IEC 60050-131-11-26).
 */

export type SourceReading =
  | { readonly ok: true; readonly value: SourceValue }
  | { readonly ok: false; readonly field: string; readonly message: string };

export function sourceFields(unit: 'V' | 'A'): readonly FieldDefinition[] {
  return [
    { type: 'quantity', key: 'amplitude', label: 'Amplitude', unit, initial: '1' },
    {
      type: 'choice',
      key: 'measure',
      label: 'Given as',
      options: [
        { value: 'rms', label: 'rms' },
        { value: 'peak', label: 'peak' },
        { value: 'peakToPeak', label: 'peak to peak' },
      ],
      initial: 'rms',
    },
    {
      type: 'choice',
      key: 'wave',
      label: 'Reference',
      options: [
        { value: 'cosine', label: 'cosine' },
        { value: 'sine', label: 'sine' },
      ],
      initial: 'cosine',
    },
    { type: 'angle', key: 'phase', label: 'Phase', initial: '0' },
    { type: 'frequency', key: 'frequency', label: 'Frequency', initial: '' },
  ];
}

/** The source's value in the solver's one form. At 0 Hz the amplitude is the direct value, however it was given. */
export function readSource(values: PartValues, unit: 'V' | 'A'): SourceReading {
  const amplitude = parseQuantity(values['amplitude'] ?? '', unit);
  if (!amplitude.ok) return { ok: false, field: 'amplitude', message: amplitude.message };
  const phase = readAngle(values['phase'] ?? '');
  if (!phase.ok) return { ok: false, field: 'phase', message: phase.message };
  const frequencyText = (values['frequency'] ?? '').trim();
  const frequency = frequencyText === '' ? null : readFrequency(frequencyText);
  if (frequency && !frequency.ok) return { ok: false, field: 'frequency', message: frequency.message };
  const direct = frequency !== null && frequency.value === 0;
  if (direct) return { ok: true, value: { rms: amplitude.value, phase: 0, frequency: 0 } };
  return {
    ok: true,
    value: {
      rms: amplitude.value / measureFactor(values['measure']),
      // A sine is a cosine a quarter period later.
      phase: values['wave'] === 'sine' ? phase.value - 90 : phase.value,
      frequency: frequency ? frequency.value : null,
    },
  };
}

function measureFactor(measure: string | undefined): number {
  if (measure === 'peak') return Math.SQRT2;
  return measure === 'peakToPeak' ? 2 * Math.SQRT2 : 1;
}

const MEASURE_WORDS: Readonly<Record<string, string>> = { rms: 'rms', peak: 'peak', peakToPeak: 'pk-pk' };

/** Two lines for the drawing: the amplitude; how it is given, its phase and its own frequency. */
export function describeSource(values: PartValues, unit: 'V' | 'A'): string {
  const amplitude = parseQuantity(values['amplitude'] ?? '', unit);
  const figure = amplitude.ok ? formatQuantity(amplitude.value, unit, 3) : (values['amplitude'] ?? '');
  const frequencyText = (values['frequency'] ?? '').trim();
  const frequency = frequencyText === '' ? null : readFrequency(frequencyText);
  if (frequency?.ok && frequency.value === 0) return `${figure}\ndirect`;
  const phase = readAngle(values['phase'] ?? '');
  const angle = phase.ok && phase.value !== 0 ? ` ∠ ${formatQuantity(phase.value, '°', 4)}` : '';
  const lines = [
    `${figure}${angle}`,
    `${MEASURE_WORDS[values['measure'] ?? 'rms'] ?? 'rms'}, ${values['wave'] === 'sine' ? 'sine' : 'cosine'}`,
  ];
  if (frequency) lines.push(frequency.ok ? formatQuantity(frequency.value, 'Hz', 4) : frequencyText);
  return lines.join('\n');
}
