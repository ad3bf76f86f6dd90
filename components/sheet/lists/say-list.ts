import type { Compartment } from '@/components/drawing/compartments';
import { sayFigureBriefly } from '../figure-wording';
import type { Item, ListResult } from '../result';
import { reachCompartment, sayDecimal, sayUnit, shorten } from '../say-number';
import { commonReach, singlesOf } from './list-rows';

/** Items that are said one by one before the rest is only counted. */
const ITEMS_SAID = 6;
const FIGURES_SAID = 8;

export const countItems = ({ items }: Pick<ListResult, 'items'>) =>
  items.length === 1 ? '1 item' : `${items.length} items`;

/** How many items there are, how many values in the lists among them, and what reaches them where they are alike. */
export function listCompartments(list: ListResult): Compartment[] {
  const singles = singlesOf(list);
  const items: Compartment[] = [{ label: 'Items', value: String(list.items.length) }];
  if (singles.length !== list.items.length)
    items.push({ label: 'Values in all', value: String(singles.length) });
  const reach = commonReach(singles);
  if (reach === null) {
    const reached = singles.filter((item) => item.reach.straightedgeAndCompass === true).length;
    items.push({
      label: 'Reach',
      value: `${reached} of ${singles.length} with straightedge and compass`,
      tone: 'approximate',
    });
    return items;
  }
  items.push(reachCompartment(reach));
  return items;
}

function sayItem(item: Item): string {
  switch (item.kind) {
    case 'number': {
      const size = item.cut?.value ?? shorten(sayDecimal(item, false), FIGURES_SAID);
      return item.unit === null ? size : `${size} ${sayUnit(item.unit)}`;
    }
    case 'angle':
      return `${shorten(item.decimal.re, FIGURES_SAID)}°`;
    case 'list':
      return `a list of ${item.items.length}`;
    default:
      return sayFigureBriefly(item);
  }
}

/** For whoever listens: how many items and the first of them, as cut where there is a cutting step. */
export function sayList({ items }: ListResult): string {
  const rest = items.length - ITEMS_SAID;
  const said = items.slice(0, ITEMS_SAID).map(sayItem).join('; ');
  return `a list of ${items.length}: ${said}${rest > 0 ? `; and ${rest} more` : ''}`;
}
