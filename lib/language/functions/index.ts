import type { Engine } from '../../engine/index';
import { type Single, type Value, needSingle, squareRoot } from '../values';
import {
  arcCosine,
  arcSine,
  arcTangent,
  cosecant,
  cosine,
  cotangent,
  secant,
  sine,
  tangent,
} from './circular';
import {
  bisect,
  foot,
  meet,
  mid,
  parallel,
  perp,
  reflect,
  rotateFigure,
} from './geometry-constructions';
import {
  abscissa,
  centre,
  circle,
  line,
  ordinate,
  point,
  polarPoint,
  radius,
  ringOfPoints,
} from './geometry-figures';
import { angleBetween, dist } from './geometry-measures';
import { countOf, flatten, sumOf } from './lists';
import { absolute, conjugate, extreme, imaginaryPart, realPart, toWhole } from './parts';
import { cubeRoot } from './roots';
import { standIn } from './stand-in';
import { chord, sagitta, versine } from './trade';

type Action = (engine: Engine, args: readonly Value[]) => Value;

/** A function of single values. */
const single =
  (action: (engine: Engine, args: readonly Single[]) => Value): Action =>
  (engine, args) =>
    action(engine, args.map(needSingle));

const one = (action: (engine: Engine, value: Single) => Value): Action =>
  single((engine, [value]) => action(engine, value as Single));

const two = (action: (engine: Engine, a: Single, b: Single) => Value): Action =>
  single((engine, [a, b]) => action(engine, a as Single, b as Single));

/**
 * What each function of the name table does. The caller has checked the number of arguments against the table; `root`
 * and `each` are not here, as not all of their arguments are values.
 */
export const ACTIONS: ReadonlyMap<string, Action> = new Map<string, Action>([
  ['sqrt', one(squareRoot)],
  ['cbrt', one(cubeRoot)],
  ['abs', one(absolute)],
  ['re', one(realPart)],
  ['im', one(imaginaryPart)],
  ['conj', one(conjugate)],
  ['sin', one(sine)],
  ['cos', one(cosine)],
  ['tan', one(tangent)],
  ['cot', one(cotangent)],
  ['sec', one(secant)],
  ['csc', one(cosecant)],
  ['asin', one(arcSine)],
  ['acos', one(arcCosine)],
  ['atan', one(arcTangent)],
  ['min', (engine, args) => extreme(engine, args.flatMap(flatten), -1)],
  ['max', (engine, args) => extreme(engine, args.flatMap(flatten), 1)],
  ['floor', single((engine, [value, step]) => toWhole(engine, 'floor', value as Single, step))],
  ['round', single((engine, [value, step]) => toWhole(engine, 'round', value as Single, step))],
  ['sum', (engine, [value]) => sumOf(engine, value as Value)],
  ['count', (engine, [value]) => countOf(engine, value as Value)],
  ['chord', two(chord)],
  ['sagitta', two(sagitta)],
  ['versine', one(versine)],
  ['standin', single(standIn)],
  ['point', point],
  ['polar', polarPoint],
  ['line', line],
  ['circle', circle],
  ['ring', ringOfPoints],
  ['meet', meet],
  ['mid', mid],
  ['foot', foot],
  ['perp', perp],
  ['parallel', parallel],
  ['bisect', bisect],
  ['rotate', rotateFigure],
  ['reflect', reflect],
  ['dist', dist],
  ['angle', angleBetween],
  ['abscissa', abscissa],
  ['ordinate', ordinate],
  ['centre', centre],
  ['radius', radius],
]);
