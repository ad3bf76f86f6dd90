import type { Bare, Exact, ItemResult, ListResult } from './result';
import { composeWritten, isSum, withUnit } from './written';

/** A list by its items, as it is typed: each with its unit. */
export function giveList(items: ItemResult[]): Bare<ListResult> {
  return {
    kind: 'list',
    exact: composeWritten(
      items.map(({ exact }) => exact),
      (texts) => `[${texts.map((text, index) => withUnit(text, unitOf(items[index]))).join(', ')}]`,
      (parts) =>
        `\\left[${parts.map((tex, index) => texWithUnit(tex, items[index])).join(',\\;')}\\right]`,
    ),
    items,
  };
}

/** The unit that is not yet in the written value: only numbers stand without theirs. */
function unitOf(item: ItemResult | undefined): string | null {
  return item?.kind === 'number' ? item.unit : null;
}

function texWithUnit(tex: string, item: ItemResult | undefined): string {
  const unit = unitOf(item);
  if (item === undefined || unit === null) return tex;
  const [name = '', exponent] = unit.split('^');
  const raised = `\\,\\mathrm{${name}}${exponent === undefined ? '' : `^{${exponent}}`}`;
  return (isSum(lastStage(item.exact)) ? `\\left(${tex}\\right)` : tex) + raised;
}

const lastStage = ({ text, staged }: Exact): string =>
  staged ? (text.split('; ').at(-1) ?? '') : text;
