/** Values in writing: text, TeX, and the list of the square roots that they need. */

import { addSums, formOf, timesI } from './form';
import type { Cx } from './minimal-polynomial';
import { isZeroEl } from './element';
import { join } from './join';
import { texOf, textOf } from './text';
import type { TowerStep, Written } from './types';

export function writeValue(x: Cx): Written {
  const s = isZeroEl(x.im) ? formOf(x.re) : addSums([formOf(x.re), timesI(formOf(x.im))]);
  return { text: textOf(s), tex: texOf(s), staged: false };
}

export function towerOf(x: Cx): TowerStep[] {
  const steps: TowerStep[] = [];
  if (!isZeroEl(x.im)) steps.push({ name: '', radicand: '-1', tex: '-1' });
  for (const g of join(x.re.t, x.im.t).t.gens) {
    const s = formOf(g.rad);
    steps.push({ name: '', radicand: textOf(s), tex: texOf(s) });
  }
  return steps.map((s, i) => ({ ...s, name: `r${i + 1}` }));
}
