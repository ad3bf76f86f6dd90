import { Tex } from '@/components/ui/tex';
import type { ListResult } from '../result';
import { exactTex, isLongList, largeTex } from '../value-tex';

/** A shorter list is one formula, with brackets as high as its items. */
const ONE_FORMULA = 60;

/**
 * A list large: its items in brackets, breaking over lines between items. One that nobody could read so stands as it
 * was written, and its items stand in the table alone.
 */
export function ListValue({ list }: { list: ListResult }) {
  if (isLongList(list) || list.exact.text.length <= ONE_FORMULA) {
    const tex = largeTex(list);
    return tex === null ? null : <Tex tex={tex} display />;
  }
  const last = list.items.length - 1;
  return (
    <span className="flex flex-wrap items-center gap-x-2 gap-y-1">
      {list.items.map((item, index) => (
        <span key={index} className="whitespace-nowrap">
          <Tex tex={`${index === 0 ? '[' : ''}${exactTex(item)}${index === last ? ']' : ',{}'}`} />
        </span>
      ))}
    </span>
  );
}
