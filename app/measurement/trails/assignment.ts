/**
 * The assignment of least total cost: every row gets a column of its own.
 *
 * `cost[row][column]`, any unit, at least as many columns as rows; Infinity forbids a pair, NaN counts as Infinity.
 * Returns the column of each row. Throws RangeError where no assignment without a forbidden pair exists.
 * Method: shortest augmenting paths with dual prices, as in D. F. Crouse, "On implementing 2D rectangular assignment
 * algorithms", IEEE Trans. Aerosp. Electron. Syst. 52(4), 1679-1696, 2016, after R. Jonker & A. Volgenant, Computing
 * 38, 325-340, 1987 (from memory, not seen; checked against SciPy's solver). Time rows²·columns.
 */
export function assign(cost: readonly (readonly number[])[]): number[] {
  const state: State = {
    cost,
    rowPrice: new Float64Array(cost.length),
    columnPrice: new Float64Array(cost[0]?.length ?? 0),
    columnOf: new Array(cost.length).fill(NONE),
    rowOf: new Array(cost[0]?.length ?? 0).fill(NONE),
  };
  for (let row = 0; row < cost.length; row++) augment(state, row);
  return state.columnOf;
}

interface State {
  cost: readonly (readonly number[])[];
  rowPrice: Float64Array;
  columnPrice: Float64Array;
  columnOf: number[];
  rowOf: number[];
}

/** Dijkstra's search from an unassigned row to the nearest free column, then the pairs along its path change over. */
function augment(state: State, start: number): void {
  const { cost, rowPrice, columnPrice, columnOf, rowOf } = state;
  const columns = columnPrice.length;
  const distance = new Float64Array(columns).fill(Number.POSITIVE_INFINITY);
  const before = new Array<number>(columns).fill(NONE);
  const closed = new Array<boolean>(columns).fill(false);
  let row = start;
  let reached = 0;
  let column = NONE;
  for (;;) {
    let nearest = NONE;
    for (let j = 0; j < columns; j++) {
      if (closed[j]) continue;
      const through = reached + cost[row][j] - rowPrice[row] - columnPrice[j];
      if (through < distance[j]) {
        distance[j] = through;
        before[j] = row;
      }
      const tie = nearest !== NONE && distance[j] === distance[nearest] && rowOf[j] === NONE;
      if (nearest === NONE || distance[j] < distance[nearest] || tie) nearest = j;
    }
    if (nearest === NONE || distance[nearest] === Number.POSITIVE_INFINITY) {
      throw new RangeError("No assignment is possible without a forbidden pair.");
    }
    column = nearest;
    reached = distance[column];
    closed[column] = true;
    if (rowOf[column] === NONE) break;
    row = rowOf[column];
  }
  rowPrice[start] += reached;
  for (let j = 0; j < columns; j++) {
    if (!closed[j]) continue;
    if (rowOf[j] !== NONE) rowPrice[rowOf[j]] += reached - distance[j];
    columnPrice[j] -= reached - distance[j];
  }
  for (;;) {
    row = before[column];
    rowOf[column] = row;
    [columnOf[row], column] = [column, columnOf[row]];
    if (row === start) return;
  }
}

const NONE = -1;
