import type { Engine } from '../../engine/index';
import { Failure, fail } from '../failure';
import { fromNum } from '../pi-sum';
import { mentions } from '../names-in';
import type {
  ApplicationNode,
  Expression,
  FunctionStatement,
  PowerNode,
  ProductNode,
  SumNode,
} from '../syntax';
import { type Value, needAlgebraic } from '../values';
import { type RadicalForm, RadicalForms } from './radical-form';

/** Exponent of the millimetre, or an angle counted in turns. */
export type Dimension = number | 'angle';

/** A side of an equation: what it is worth for every unknown, and of which kind. */
export interface Formed {
  readonly form: RadicalForm;
  readonly dimension: Dimension;
}

/** A name that stands for a value, or for one that depends on the unknown. */
type Meaning = { readonly value: Value } | { readonly formed: Formed };

/** The evaluation around an equation. */
export interface Surroundings {
  readonly engine: Engine;
  /** Local names of the line, which are seen in the equation. */
  readonly locals: ReadonlyMap<string, Value>;
  /** The value of an expression with these local names and no others. */
  readonly valueIn: (locals: ReadonlyMap<string, Value>, node: Expression) => Value;
  /** The function of the notebook that is called; fails where there is none, or with the wrong count of arguments. */
  readonly functionOf: (node: ApplicationNode) => FunctionStatement;
}

/** Thrown where the unknown stands in a place that fractions and square roots do not cover. */
export class OutsideForms extends Error {}

/** Powers of a form are multiplied out up to this exponent. */
const LARGEST_EXPONENT = 64n;

/**
 * Reads expressions as radical forms in one unknown of a given kind. What does not mention the unknown is evaluated as
 * always. Fails with `unit-mismatch` where the unknown cannot be of that kind.
 */
export class FormReader {
  readonly forms: RadicalForms;
  private names: ReadonlyMap<string, Meaning>;

  constructor(
    private readonly around: Surroundings,
    unknown: string,
    private readonly dimension: Dimension,
  ) {
    this.forms = new RadicalForms(around.engine);
    const names = new Map<string, Meaning>();
    for (const [name, value] of around.locals) names.set(name, { value });
    names.set(unknown, { formed: { form: this.forms.unknown(), dimension } });
    this.names = names;
  }

  private get engine(): Engine {
    return this.around.engine;
  }

  read(node: Expression): Formed {
    if (this.isKnown(node)) return this.formOf(this.evaluate(node));
    switch (node.kind) {
      case 'mark': {
        const meaning = this.names.get(node.name);
        if (meaning === undefined || 'value' in meaning)
          throw new Error(`\`${node.name}\` does not depend on the unknown.`);
        return meaning.formed;
      }
      case 'group':
        return this.read(node.value);
      case 'negative': {
        const { form, dimension } = this.read(node.value);
        return { form: this.forms.negate(form), dimension };
      }
      case 'root':
        return this.squareRoot(this.read(node.value));
      case 'sum':
        return this.sum(node);
      case 'product':
        return this.product(node);
      case 'power':
        return this.power(node);
      case 'call': {
        const [only] = node.args;
        if (only !== undefined && node.name === 'sqrt') return this.squareRoot(this.read(only));
        // |w| is √(w²) for real w; substitution tells the rest.
        if (only !== undefined && node.name === 'abs') {
          const inner = this.read(only);
          return this.squareRoot(this.multiply(inner, inner));
        }
        throw new OutsideForms();
      }
      case 'application':
        return this.application(node);
      default:
        throw new OutsideForms();
    }
  }

  private isKnown(node: Expression): boolean {
    for (const [name, meaning] of this.names)
      if ('formed' in meaning && mentions(node, name)) return false;
    return true;
  }

  private evaluate(node: Expression): Value {
    const locals = new Map<string, Value>();
    for (const [name, meaning] of this.names)
      if ('value' in meaning) locals.set(name, meaning.value);
    return this.around.valueIn(locals, node);
  }

  /** Reads the body of a function of the notebook, whose parameters stand for what the arguments are worth. */
  private application(node: ApplicationNode): Formed {
    const { parameters, where, value } = this.around.functionOf(node);
    const meaningOf = (part: Expression): Meaning =>
      this.isKnown(part) ? { value: this.evaluate(part) } : { formed: this.read(part) };
    const args = node.args.map(meaningOf);
    const outer = this.names;
    this.names = new Map(parameters.map(({ name }, index) => [name, args[index] as Meaning]));
    try {
      for (const local of where)
        this.names = new Map(this.names).set(local.name, meaningOf(local.value));
      return this.read(value);
    } catch (error) {
      // Places in the body are places in another line.
      if (!(error instanceof Failure)) throw error;
      throw new Failure(error.code, `In \`${node.callee.name}\`: ${error.message}`, node);
    } finally {
      this.names = outer;
    }
  }

  /** The difference of two sides, which must be of one kind. */
  subtract(a: Formed, b: Formed): Formed {
    return this.add(a, { form: this.forms.negate(b.form), dimension: b.dimension });
  }

  private formOf(value: Value): Formed {
    switch (value.kind) {
      case 'number':
        return { form: this.forms.constant(value.sum), dimension: value.length };
      case 'angle':
        return {
          form: this.forms.constant(fromNum(this.engine, value.turns)),
          dimension: 'angle',
        };
      default:
        throw new OutsideForms();
    }
  }

  private sum(node: SumNode): Formed {
    const [first, ...rest] = node.terms.map(({ sign, value }) => {
      const { form, dimension } = this.read(value);
      return { form: sign === '-' ? this.forms.negate(form) : form, dimension };
    });
    return rest.reduce((total, term) => this.add(total, term), first as Formed);
  }

  private add(a: Formed, b: Formed): Formed {
    if (a.dimension !== b.dimension) {
      fail(
        'unit-mismatch',
        `With the unknown as ${sayDimension(this.dimension)}, ${sayDimension(a.dimension)} meets ${sayDimension(b.dimension)} in a sum or on the other side; two values of one kind were expected.`,
      );
    }
    return { form: this.forms.add(a.form, b.form), dimension: a.dimension };
  }

  private product(node: ProductNode): Formed {
    const [first, ...rest] = node.factors;
    return rest.reduce(
      (total, { operator, value }) => {
        const factor = this.read(value);
        return this.multiply(total, operator === '/' ? this.invert(factor) : factor);
      },
      this.read((first as ProductNode['factors'][number]).value),
    );
  }

  private multiply(a: Formed, b: Formed): Formed {
    return {
      form: this.forms.multiply(a.form, b.form),
      dimension: this.productDimension(a.dimension, b.dimension),
    };
  }

  private productDimension(a: Dimension, b: Dimension): Dimension {
    if (a !== 'angle' && b !== 'angle') return a + b;
    if (a === 0 || b === 0) return 'angle';
    return fail(
      'unit-mismatch',
      `With the unknown as ${sayDimension(this.dimension)}, an angle meets ${sayDimension(a === 'angle' ? b : a)} in a product; a plain number was expected.`,
    );
  }

  private invert({ form, dimension }: Formed): Formed {
    // A quotient of two angles is a plain number; such equations are left to the search.
    if (dimension === 'angle') throw new OutsideForms();
    return { form: this.forms.invert(form), dimension: -dimension };
  }

  private squareRoot({ form, dimension }: Formed): Formed {
    if (dimension === 'angle' || dimension % 2 !== 0) {
      fail(
        'unit-mismatch',
        `With the unknown as ${sayDimension(this.dimension)}, a square root is taken of ${sayDimension(dimension)}; an area or a plain number was expected.`,
      );
    }
    return { form: this.forms.squareRoot(form), dimension: dimension / 2 };
  }

  private power(node: PowerNode): Formed {
    if (!this.isKnown(node.exponent)) throw new OutsideForms();
    const exact = needAlgebraic(
      this.engine,
      this.evaluate(node.exponent),
      'An exponent is a plain number',
    );
    const exponent = this.engine.asRational(exact);
    if (exponent === null || exponent.d > 2n) throw new OutsideForms();
    const size = exponent.n < 0n ? -exponent.n : exponent.n;
    if (size > LARGEST_EXPONENT) {
      fail(
        'limit-size',
        `The unknown is raised to ${String(exponent.n)}; the limit is ${LARGEST_EXPONENT}.`,
        node,
      );
    }
    const base = this.read(node.base);
    const root = exponent.d === 2n ? this.squareRoot(base) : base;
    let raised: Formed = {
      form: this.forms.constant(fromNum(this.engine, this.engine.integer(1n))),
      dimension: 0,
    };
    for (let step = 0n; step < size; step += 1n) raised = this.multiply(raised, root);
    return exponent.n < 0n ? this.invert(raised) : raised;
  }
}

/** `a length`, `an area`, …, to stand in a sentence. */
export function sayDimension(dimension: Dimension): string {
  const names: Readonly<Record<number, string>> = {
    0: 'a plain number',
    1: 'a length',
    2: 'an area',
    3: 'a volume',
  };
  if (dimension === 'angle') return 'an angle';
  return names[dimension] ?? `a value in mm^${dimension}`;
}
