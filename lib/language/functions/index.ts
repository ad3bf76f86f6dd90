import type { Engine } from '../../engine/index';
import type { Value } from '../values';
import { squareRoot } from '../values';
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
} from './geometry-figures';
import { angleBetween, dist } from './geometry-measures';
import { absolute, conjugate, extreme, imaginaryPart, realPart, toWhole } from './parts';
import { cubeRoot } from './roots';
import { standIn } from './stand-in';
import { chord, sagitta, versine } from './trade';

type Action = (engine: Engine, args: readonly Value[]) => Value;

const one =
  (action: (engine: Engine, value: Value) => Value): Action =>
  (engine, [value]) =>
    action(engine, value as Value);

const two =
  (action: (engine: Engine, a: Value, b: Value) => Value): Action =>
  (engine, [a, b]) =>
    action(engine, a as Value, b as Value);

/**
 * What each function of the name table does. The caller has checked the number of arguments against the table; `root`
 * is not here, as its first argument is a polynomial and not a value.
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
  ['min', (engine, args) => extreme(engine, args, -1)],
  ['max', (engine, args) => extreme(engine, args, 1)],
  ['floor', (engine, [value, step]) => toWhole(engine, 'floor', value as Value, step)],
  ['round', (engine, [value, step]) => toWhole(engine, 'round', value as Value, step)],
  ['chord', two(chord)],
  ['sagitta', two(sagitta)],
  ['versine', one(versine)],
  ['standin', standIn],
  ['point', point],
  ['polar', polarPoint],
  ['line', line],
  ['circle', circle],
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
