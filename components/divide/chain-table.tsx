import { Download } from '@/components/ui/button';
import { Tex } from '@/components/ui/tex';
import { DETEMPLE_CARLYLE_CIRCLES, lastLevel, periodTex } from '@/lib/divisions';
import type { ShownChain } from './chains';
import { CELL, FIGURES, ROW, ScrollTable } from '@/components/ui/scroll-table';
import { sayCount, sayDecimal } from './wording';

function countSentence({ chain, rows }: ShownChain): string {
  const { prime, quadratics } = chain;
  const total = quadratics.length;
  const one = total === 1 ? 'One quadratic is' : `${sayCount(total)} quadratics are`;
  const shown =
    rows.length < total ? ` The first ${rows.length} stand here; the file has all.` : '';
  if (prime === 257) {
    return `${one} enough, as many as DeTemple (1991) counts Carlyle circles.${shown}`;
  }
  if (prime === 65537) {
    const bound = DETEMPLE_CARLYLE_CIRCLES[prime];
    return `${one} enough, ${bound - total} below DeTemple’s bound of ${sayCount(bound)} Carlyle circles (1991).${shown}`;
  }
  return `${one} enough.${shown}`;
}

/** The quadratics of a Fermat prime in their order, each with its Carlyle circle. */
export function ChainTable(shown: ShownChain) {
  const { chain, rows } = shown;
  const { prime } = chain;
  const last = lastLevel(prime);
  return (
    <section className="space-y-2" aria-label={`Quadratics for ${prime}`}>
      <h3 className="font-semibold">Quadratics for {prime}</h3>
      <p className="max-w-prose text-small text-soft">
        {countSentence(shown)} <Tex tex={periodTex({ level: last, index: 0 })} /> is twice the
        cosine of one part. Each product is an integer combination of roots already found.
      </p>
      <ScrollTable
        caption={`Quadratics for ${prime} with their Carlyle circles`}
        heads={['', 'Quadratic', 'Larger root', 'Smaller root', 'Centre of the circle', 'Radius']}
      >
        {rows.map(({ quadratic, tex, larger, smaller, circle }, index) => (
          <tr key={tex} className={ROW}>
            <th scope="row" className={`${FIGURES} text-soft`}>
              {index + 1}
            </th>
            <td className={CELL}>
              <Tex tex={tex} />
            </td>
            <td className={CELL}>
              <Tex tex={periodTex(quadratic.larger)} />{' '}
              <span className="font-mono">{sayDecimal(larger)}</span>
            </td>
            <td className={CELL}>
              <Tex tex={periodTex(quadratic.smaller)} />{' '}
              <span className="font-mono">{sayDecimal(smaller)}</span>
            </td>
            <td className={FIGURES}>
              ({sayDecimal(circle.centre.x)}, {sayDecimal(circle.centre.y)})
            </td>
            <td className={FIGURES}>{circle.radius}</td>
          </tr>
        ))}
      </ScrollTable>
      <Download href={`/divide/chain?prime=${prime}`}>
        All {sayCount(chain.quadratics.length)} as JSON
      </Download>
    </section>
  );
}
