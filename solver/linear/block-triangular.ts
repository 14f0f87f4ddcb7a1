/** A diagonal block: as many rows as columns. */
export interface Block {
  readonly rows: readonly number[];
  readonly columns: readonly number[];
}

/**
 * The finest block triangular form of a square pattern: the determinant of a matrix with that pattern is, but for the
 * sign, the product of those of the blocks. Rows are matched to columns along augmenting paths (Duff 1981, doi
 * 10.1145/355958.355963); the blocks are the strong components of what is left (Tarjan 1972, doi 10.1137/0201010; Duff
 * and Reid 1978, doi 10.1145/355780.355785). `columnsOf` lists the columns of each row. Undefined if no matching is
 * complete: then every matrix with the pattern is singular.
 */
export function blockTriangular(columnsOf: readonly (readonly number[])[]): readonly Block[] | undefined {
  const rowOfColumn = match(columnsOf);
  if (rowOfColumn === undefined) return undefined;
  const columnOfRow = new Int32Array(columnsOf.length);
  rowOfColumn.forEach((row, column) => {
    columnOfRow[row] = column;
  });
  const nextOf = columnsOf.map((columns) => columns.map((column) => rowOfColumn[column] ?? 0));
  return strongComponents(nextOf).map((rows) => ({ rows, columns: rows.map((row) => columnOfRow[row] ?? 0) }));
}

function match(columnsOf: readonly (readonly number[])[]): Int32Array | undefined {
  const size = columnsOf.length;
  const rowOfColumn = new Int32Array(size).fill(-1);
  const seen = new Int32Array(size).fill(-1);
  const augment = (row: number, round: number): boolean => {
    const columns = columnsOf[row] ?? [];
    for (const column of columns) {
      if (rowOfColumn[column] !== -1) continue;
      rowOfColumn[column] = row;
      return true;
    }
    for (const column of columns) {
      if (seen[column] === round) continue;
      seen[column] = round;
      if (!augment(rowOfColumn[column] ?? 0, round)) continue;
      rowOfColumn[column] = row;
      return true;
    }
    return false;
  };
  for (let row = 0; row < size; row++) if (!augment(row, row)) return undefined;
  return rowOfColumn;
}

function strongComponents(nextOf: readonly (readonly number[])[]): number[][] {
  const size = nextOf.length;
  const order = new Int32Array(size).fill(-1);
  const low = new Int32Array(size);
  const onStack = new Uint8Array(size);
  const stack: number[] = [];
  const found: number[][] = [];
  let count = 0;
  const visit = (vertex: number): void => {
    order[vertex] = count;
    low[vertex] = count;
    count += 1;
    stack.push(vertex);
    onStack[vertex] = 1;
    for (const next of nextOf[vertex] ?? []) {
      if (order[next] === -1) {
        visit(next);
        low[vertex] = Math.min(low[vertex] ?? 0, low[next] ?? 0);
      } else if (onStack[next] === 1) {
        low[vertex] = Math.min(low[vertex] ?? 0, order[next] ?? 0);
      }
    }
    if (low[vertex] !== order[vertex]) return;
    const start = stack.lastIndexOf(vertex);
    const component = stack.splice(start);
    for (const member of component) onStack[member] = 0;
    found.push(component.sort((a, b) => a - b));
  };
  for (let vertex = 0; vertex < size; vertex++) if (order[vertex] === -1) visit(vertex);
  return found;
}
