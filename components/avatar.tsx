import { classNames } from './class-names';

export type AvatarProps = {
  readonly name: string;
  readonly size?: 'small' | 'medium';
  /** When the name stands beside it, the picture says nothing new. */
  readonly decorative?: boolean;
};

const RINGS = ['border-voltage text-voltage', 'border-current text-current', 'border-power text-power'] as const;

/** A person as two letters in a ring; the same person always has the same ring. */
export function Avatar({ name, size = 'small', decorative = false }: AvatarProps) {
  return (
    <span
      role={decorative ? undefined : 'img'}
      aria-label={decorative ? undefined : name}
      aria-hidden={decorative || undefined}
      title={decorative ? undefined : name}
      className={classNames(
        'inline-flex shrink-0 items-center justify-center rounded-full border-2 bg-raised font-semibold select-none',
        size === 'small' ? 'size-[26px] text-[11px]' : 'size-9 text-[13px]',
        RINGS[ringOf(name)],
      )}
    >
      {initials(name)}
    </span>
  );
}

/** First letters of the first and the last word; a lone word gives its first two. */
export function initials(name: string): string {
  const words = name.trim().split(/\s+/).filter((word) => word !== '');
  const first = words[0];
  if (first === undefined) return '?';
  const last = words.length > 1 ? words[words.length - 1] : undefined;
  const letters = last === undefined ? [...first].slice(0, 2) : [...first].slice(0, 1).concat([...last].slice(0, 1));
  return letters.join('').toLocaleUpperCase('en');
}

function ringOf(name: string): number {
  // FNV-1a, so that names that differ little still part.
  let hash = 0x811c9dc5;
  for (const character of name) hash = Math.imul(hash ^ (character.codePointAt(0) ?? 0), 0x01000193) >>> 0;
  return hash % RINGS.length;
}
