import { read } from './source-files';

/** The text of the one code block whose info string is `info`. @throws when there is none, or more than one. */
export function blockOf(file: string, info: string): string {
  const blocks = [...read(file).matchAll(/^```([^\n]*)\n([\s\S]*?)^```$/gm)].filter(([, found]) => found === info);
  const [only, ...more] = blocks;
  if (only?.[2] === undefined || more.length > 0) throw new Error(`${file} has ${blocks.length} blocks of ${info}, not one`);
  return only[2];
}

/** The rows of the one table with this heading row, each as its cells without the backticks round them. */
export function tableOf(file: string, heading: string): readonly (readonly string[])[] {
  const lines = read(file).split('\n');
  const starts = lines.flatMap((line, index) => (line === heading ? [index] : []));
  const [start, ...more] = starts;
  if (start === undefined || more.length > 0) throw new Error(`${file} has ${starts.length} tables headed ${heading}, not one`);
  const end = lines.findIndex((line, index) => index > start && !line.startsWith('|'));
  return lines.slice(start + 2, end === -1 ? undefined : end).map(cellsOf);
}

function cellsOf(row: string): readonly string[] {
  // A bar inside a cell is written with a backslash before it.
  return row
    .split(/(?<!\\)\|/)
    .slice(1, -1)
    .map((cell) => cell.trim().replace(/^`([^`]*)`$/, '$1'));
}

/** Everything between backticks in running text and tables, not in blocks of code. */
export function quoted(file: string): readonly string[] {
  const prose = read(file).replace(/^```[\s\S]*?^```$/gm, '');
  return [...prose.matchAll(/`([^`\n]+(?:\n[^`\n]+)?)`/g)].map(([, text]) => (text ?? '').replace(/\n/g, ' '));
}

/** The targets of links in running text. */
export function links(file: string): readonly string[] {
  const prose = read(file).replace(/^```[\s\S]*?^```$/gm, '');
  return [...prose.matchAll(/\]\(([^)\s]+)\)/g)].map(([, target]) => target ?? '');
}
