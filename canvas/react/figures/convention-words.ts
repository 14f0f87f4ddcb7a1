import type { ReadingConvention } from '../../network/format-reading';

/** The convention in a word or two, beside a heading: `polar · rms`. */
export function conventionWords(convention: ReadingConvention): string {
  return convention === 'direct' ? 'direct' : `${convention.form} · ${convention.amplitude}`;
}

/** The convention as it stands on every sheet. */
export function conventionSentence(convention: ReadingConvention): string {
  if (convention === 'direct') return 'Direct values: no phase';
  return `Phasors: ${convention.amplitude}, cosine · degrees`;
}
