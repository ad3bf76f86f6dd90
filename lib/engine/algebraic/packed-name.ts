/** The ways in which numbers beyond square roots are written, as plain data; see `packed.ts`. */
import { packElements, unpackElements, type PackedTower } from '../packed';
import type { Field, El } from '../tower';
import type { Cosine, Radical, WrittenName } from './atoms';
import type { NamedSum } from './named-sum';

/** A named sum without the field of its coefficients. */
export type PackedSum = readonly {
  readonly coefficient: PackedTower;
  readonly factors: readonly { readonly atom: PackedAtom; readonly power: number }[];
}[];

type PackedAtom = Radical | Cosine | PackedName;

interface PackedName extends Omit<WrittenName, 'root'> {
  readonly root?: Omit<NonNullable<WrittenName['root']>, 'radicand'> & {
    readonly radicand: PackedSum;
  };
}

export function packSum(sum: NamedSum): PackedSum {
  return sum.map(({ coefficient, factors }) => ({
    coefficient: packElements([coefficient.re, coefficient.im]),
    factors: factors.map(({ atom, power }) => {
      if (atom.kind !== 'written') return { atom, power };
      const { root, ...name } = atom;
      if (root === undefined) return { atom: name, power };
      return { atom: { ...name, root: { ...root, radicand: packSum(root.radicand) } }, power };
    }),
  }));
}

export function unpackSum(f: Field, sum: PackedSum): NamedSum {
  return sum.map(({ coefficient, factors }) => {
    const [re, im] = unpackElements(f, coefficient) as [El, El];
    return {
      coefficient: { re, im },
      factors: factors.map(({ atom, power }) => {
        if (atom.kind !== 'written') return { atom, power };
        const { root, ...name } = atom;
        if (root === undefined) return { atom: name, power };
        return {
          atom: { ...name, root: { ...root, radicand: unpackSum(f, root.radicand) } },
          power,
        };
      }),
    };
  });
}
