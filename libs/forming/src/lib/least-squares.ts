/** A linear least-squares fit. */
export interface LinearFit {
  coefficients: number[];
  /** Standard deviation of each coefficient; NaN is never given: null where there are no degrees of freedom. */
  standardErrors: number[] | null;
  /** Standard deviation of what the fit leaves over; null without degrees of freedom. */
  residualSd: number | null;
  /** (XᵀX)⁻¹, by rows. */
  inverseNormal: number[][];
}

/** Below this share of a column's length, what is left of it after the columns before is called nought. */
const RANK_TOLERANCE = 1e-12;

/**
 * Fits y = X·b by the least sum of squares: modified Gram-Schmidt, the right side carried along.
 * Undefined if the columns of X depend on each other, or if there are fewer rows than columns.
 */
export function fitLinear(rows: readonly (readonly number[])[], y: readonly number[]): LinearFit | undefined {
  const count = rows[0]?.length ?? 0;
  if (count === 0 || rows.length < count) return undefined;
  const factors = factorize(rows, y, count);
  if (!factors) return undefined;
  const { triangle, projected, squaresLeft } = factors;
  const coefficients = backSubstitute(triangle, projected);
  const inverse = invertTriangle(triangle);
  const inverseNormal = inverse.map((row) => inverse.map((other) => dot(row, other)));
  const freedom = rows.length - count;
  const residualSd = freedom > 0 ? Math.sqrt(squaresLeft / freedom) : null;
  const standardErrors =
    residualSd === null ? null : inverseNormal.map((row, index) => residualSd * Math.sqrt(row[index] ?? 0));
  return { coefficients, standardErrors, residualSd, inverseNormal };
}

interface Factors {
  triangle: number[][];
  projected: number[];
  squaresLeft: number;
}

function factorize(
  rows: readonly (readonly number[])[],
  y: readonly number[],
  count: number,
): Factors | undefined {
  const columns = Array.from({ length: count }, (_, column) => rows.map((row) => row[column] ?? 0));
  const left = [...y];
  const triangle = columns.map(() => new Array<number>(count).fill(0));
  const projected: number[] = [];
  for (const [index, column] of columns.entries()) {
    const lengthBefore = Math.hypot(...rows.map((row) => row[index] ?? 0));
    const length = Math.hypot(...column);
    if (!(length > RANK_TOLERANCE * lengthBefore)) return undefined;
    const unit = column.map((value) => value / length);
    setEntry(triangle, index, index, length);
    for (let later = index + 1; later < count; later += 1) {
      setEntry(triangle, index, later, takeAway(columns[later] ?? [], unit));
    }
    projected.push(takeAway(left, unit));
  }
  return { triangle, projected, squaresLeft: dot(left, left) };
}

function setEntry(matrix: number[][], row: number, column: number, value: number): void {
  const target = matrix[row];
  if (target) target[column] = value;
}

/** Takes the part along `unit` out of `vector`, in place, and gives its size. */
function takeAway(vector: number[], unit: readonly number[]): number {
  const size = dot(vector, unit);
  for (const [index, value] of unit.entries()) vector[index] = (vector[index] ?? 0) - size * value;
  return size;
}

function backSubstitute(triangle: readonly (readonly number[])[], right: readonly number[]): number[] {
  const solution = new Array<number>(right.length).fill(0);
  for (let row = right.length - 1; row >= 0; row -= 1) {
    const rest = (right[row] ?? 0) - dot(triangle[row] ?? [], solution);
    solution[row] = rest / (triangle[row]?.[row] ?? 1);
  }
  return solution;
}

/** The inverse of an upper triangle, by rows. */
function invertTriangle(triangle: readonly (readonly number[])[]): number[][] {
  const columns = triangle.map((_, index) =>
    backSubstitute(
      triangle,
      triangle.map((__, row) => (row === index ? 1 : 0)),
    ),
  );
  return triangle.map((_, row) => columns.map((column) => column[row] ?? 0));
}

function dot(a: readonly number[], b: readonly number[]): number {
  return a.reduce((total, value, index) => total + value * (b[index] ?? 0), 0);
}

/** A curve to be fitted: what it leaves over with given parameters, and the slopes of that by each parameter. */
export interface CurveProblem {
  residuals: (parameters: readonly number[]) => number[];
  slopes: (parameters: readonly number[]) => number[][];
}

/** A fit of a curve. */
export interface CurveFit {
  parameters: number[];
  residuals: number[];
  /** (JᵀJ)⁻¹ at the parameters found. */
  inverseNormal: number[][];
}

const STEPS_MAX = 500;
const STEP_TOLERANCE = 1e-13;
const DAMPING_MAX = 1e16;

/**
 * Finds the parameters with the least sum of squares from a start nearby: Levenberg-Marquardt, damped by the size of
 * each column. Undefined if it does not come to rest or the parameters cannot be told apart.
 */
export function fitCurve(problem: CurveProblem, start: readonly number[]): CurveFit | undefined {
  let parameters = [...start];
  let squares = sumOfSquares(problem.residuals(parameters));
  let damping = 1e-3;
  for (let step = 0; step < STEPS_MAX && Number.isFinite(squares); step += 1) {
    const move = findMove(problem, parameters, damping);
    if (!move) return undefined;
    if (isAtRest(move, parameters)) return toCurveFit(problem, parameters);
    const next = parameters.map((value, index) => value + (move[index] ?? 0));
    const nextSquares = sumOfSquares(problem.residuals(next));
    const isBetter = nextSquares <= squares;
    damping = isBetter ? damping / 10 : damping * 10;
    if (damping > DAMPING_MAX) return toCurveFit(problem, parameters);
    if (isBetter) [parameters, squares] = [next, nextSquares];
  }
  return undefined;
}

function findMove(
  problem: CurveProblem,
  parameters: readonly number[],
  damping: number,
): number[] | undefined {
  const slopes = problem.slopes(parameters);
  const sizes = parameters.map((_, index) => Math.hypot(...slopes.map((row) => row[index] ?? 0)));
  const damped = sizes.map((size, index) =>
    sizes.map((_, at) => (at === index ? Math.sqrt(damping) * size : 0)),
  );
  const right = problem.residuals(parameters).map((value) => -value);
  return fitLinear([...slopes, ...damped], [...right, ...sizes.map(() => 0)])?.coefficients;
}

function isAtRest(move: readonly number[], parameters: readonly number[]): boolean {
  return move.every(
    (value, index) => Math.abs(value) <= STEP_TOLERANCE * (1 + Math.abs(parameters[index] ?? 0)),
  );
}

function toCurveFit(problem: CurveProblem, parameters: number[]): CurveFit | undefined {
  const residuals = problem.residuals(parameters);
  const linear = fitLinear(problem.slopes(parameters), residuals);
  return linear && { parameters, residuals, inverseNormal: linear.inverseNormal };
}

function sumOfSquares(values: readonly number[]): number {
  return dot(values, values);
}
