/** Equal divisions of the circle. See README.md in this folder. */

export { carlyleCircle, type CarlyleCircle } from './carlyle';
export { DETEMPLE_CARLYLE_CIRCLES, quadraticChain } from './chain';
export type { Chain, Combination, Quadratic, Term } from './chain';
export { chainRows, periodTex, quadraticTex, type ChainRow } from './chain-rows';
export { checkChain, type ChainCheck } from './check-chain';
export { divide, type DividedCircle, type Division, type DivisionOutcome } from './divide';
export { chainDocument, type ChainDocument } from './export-chain';
export { atOnce } from './fixed-point';
export { vertices, type Measure, type Measures, type Vertex } from './measures';
export { cosineDegree, factorise, type PrimePower } from './numbers';
export { isFermatPrime, lastLevel, type FermatPrime, type Period } from './periods';
export { decideDivision, FERMAT_PRIMES, type DivisionReach } from './reach';
export type { DivisionFault, Radius } from './request';
export { divisionSteps, type DivisionStep } from './steps';
