import { readFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, test } from 'vitest';

/*
 * Text is to stand out from its ground by 4.5 : 1, the outline of a control by 3 : 1 (WCAG 2.2, 1.4.3 and 1.4.11), in
 * both themes. Contrast by the formula of WCAG 2.2, "relative luminance".
 */

const css = readFileSync(path.resolve(import.meta.dirname, '../../app/globals.css'), 'utf8');

function tokensOf(selector: string): ReadonlyMap<string, string> {
  const start = css.indexOf(`${selector} {`);
  if (start < 0) throw new Error(`globals.css has no ${selector}`);
  const block = css.slice(start, css.indexOf('}', start));
  return new Map([...block.matchAll(/--([a-z]+):\s*([^;]+);/g)].map(([, name = '', value = '']) => [name, value]));
}

const THEMES = [
  ['day', tokensOf(':root')],
  ['night', tokensOf(":root[data-theme='night']")],
] as const;

function luminance(hex: string): number {
  const channels = /^#([0-9a-f]{2})([0-9a-f]{2})([0-9a-f]{2})$/.exec(hex)?.slice(1);
  if (channels === undefined) throw new Error(`${hex} is not a plain colour`);
  const [red = 0, green = 0, blue = 0] = channels.map((text) => {
    const share = Number.parseInt(text, 16) / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

function contrast(tokens: ReadonlyMap<string, string>, one: string, other: string): number {
  const [low = 0, high = 0] = [one, other].map((name) => luminance(tokens.get(name) ?? name)).sort((a, b) => a - b);
  return (high + 0.05) / (low + 0.05);
}

describe.each(THEMES)('%s', (_name, tokens) => {
  const grounds = ['paper', 'raised', 'sunken'] as const;
  const texts = ['ink', 'muted', 'voltage', 'current', 'power', 'holds', 'falls', 'caution'] as const;

  test.each(texts.flatMap((text) => grounds.map((ground) => [text, ground] as const)))('%s reads on %s', (text, ground) => {
    expect(contrast(tokens, text, ground)).toBeGreaterThanOrEqual(4.5);
  });

  test.each(['ink', 'falls', 'power'] as const)('paper reads on %s', (ground) => {
    expect(contrast(tokens, 'paper', ground)).toBeGreaterThanOrEqual(4.5);
  });

  test.each(['paper', 'raised'] as const)('the outline of a control stands out from %s', (ground) => {
    expect(contrast(tokens, 'edge', ground)).toBeGreaterThanOrEqual(3);
  });
});

test('night is the same by the system’s choice as by the person’s', () => {
  expect(tokensOf(":root:not([data-theme='day'])")).toEqual(tokensOf(":root[data-theme='night']"));
});
