import type { Expression, ProductNode, QuantityNode, Relation, Statement } from './syntax';

const GREEK = new Set(
  'alpha beta gamma delta epsilon zeta eta theta iota kappa lambda mu nu xi rho sigma tau upsilon phi chi psi omega Gamma Delta Theta Lambda Xi Sigma Upsilon Phi Psi Omega'.split(
    ' ',
  ),
);

const LETTERS: Readonly<Record<string, string>> = {
  α: 'alpha',
  β: 'beta',
  γ: 'gamma',
  δ: 'delta',
  ε: 'epsilon',
  ζ: 'zeta',
  η: 'eta',
  θ: 'theta',
  ι: 'iota',
  κ: 'kappa',
  λ: 'lambda',
  μ: 'mu',
  ν: 'nu',
  ξ: 'xi',
  ρ: 'rho',
  σ: 'sigma',
  ς: 'varsigma',
  τ: 'tau',
  υ: 'upsilon',
  φ: 'phi',
  χ: 'chi',
  ψ: 'psi',
  ω: 'omega',
  Γ: 'Gamma',
  Δ: 'Delta',
  Θ: 'Theta',
  Λ: 'Lambda',
  Ξ: 'Xi',
  Σ: 'Sigma',
  Υ: 'Upsilon',
  Φ: 'Phi',
  Ψ: 'Psi',
  Ω: 'Omega',
  Π: 'Pi',
};

/** Capitals that look like Latin ones, and omicron, have no command of their own. */
const LATIN_LOOK: Readonly<Record<string, string>> = {
  Α: 'A',
  Β: 'B',
  Ε: 'E',
  Ζ: 'Z',
  Η: 'H',
  Ι: 'I',
  Κ: 'K',
  Μ: 'M',
  Ν: 'N',
  Ο: 'O',
  Ρ: 'P',
  Τ: 'T',
  Χ: 'X',
  ο: 'o',
};

const RELATIONS: Readonly<Record<Relation, string>> = {
  '==': '=',
  '!=': '\\ne',
  '<': '<',
  '<=': '\\le',
  '>': '>',
  '>=': '\\ge',
};

/** Commands that TeX has for a function; the others are set upright. */
const COMMANDS: Readonly<Record<string, string>> = {
  sin: '\\sin',
  cos: '\\cos',
  tan: '\\tan',
  cot: '\\cot',
  sec: '\\sec',
  csc: '\\csc',
  asin: '\\arcsin',
  acos: '\\arccos',
  atan: '\\arctan',
  min: '\\min',
  max: '\\max',
};

/** TeX of a line as it was typed, marks in it. Uses commands of amsmath only. */
export function typesetStatement(statement: Statement): string {
  const before = typesetBeforeWhere(statement);
  if (statement.where.length === 0) return before;
  const locals = statement.where.map(({ name, value }) => `${typesetMark(name)}=${typeset(value)}`);
  return `${before}\\quad\\text{where }${locals.join(',\\;')}`;
}

function typesetBeforeWhere(statement: Statement): string {
  switch (statement.kind) {
    case 'definition':
      return `${typesetMark(statement.mark)}=${typeset(statement.value)}`;
    case 'function': {
      const parameters = statement.parameters.map(({ name }) => typesetMark(name));
      const head = typesetMark(statement.mark) + inBrackets(parameters.join(',\\,'));
      return `${head}=${typeset(statement.value)}`;
    }
    case 'value':
      return typeset(statement.value);
    case 'decision':
      return statement.sides
        .map(
          (side, index) =>
            (index === 0 ? '' : RELATIONS[statement.relations[index - 1] ?? '=='] + ' ') +
            typeset(side),
        )
        .join(' ');
  }
}

/**
 * TeX of a mark: one letter slanted, a word upright, what follows the first underscore or a letter's trailing digits
 * as an index, Greek by name or letter as Greek.
 */
export function typesetMark(mark: string): string {
  const parts = /^(\p{L}+?)(?:_([\p{L}\d_]*)|(\d[\p{L}\d_]*))?$/u.exec(mark);
  const [, stem = mark, after, digits] = parts ?? [];
  const index = (after ?? digits ?? '').replace(/_+$/u, '');
  return index === ''
    ? typesetStem(stem)
    : `${typesetStem(stem)}_{${index.split('_').map(typesetIndex).join(',')}}`;
}

function typesetIndex(part: string): string {
  return /^\d*$/.test(part) ? part : typesetStem(part);
}

function typesetStem(stem: string): string {
  if (GREEK.has(stem)) return `\\${stem}`;
  const letters = [...stem];
  if (letters.length === 1) return typesetLetter(stem);
  if (letters.every((letter) => /[A-Za-z\d]/.test(letter))) return `\\mathrm{${stem}}`;
  return letters.map(typesetLetter).join('');
}

/** One letter in mathematics; an accented one is taken apart, as TeX has no slanted glyph for it. */
function typesetLetter(letter: string): string {
  if (/[A-Za-z\d]/.test(letter)) return letter;
  const look = LATIN_LOOK[letter];
  if (look !== undefined) return `\\mathrm{${look}}`;
  const greek = LETTERS[letter];
  if (greek !== undefined) return `{\\${greek}}`;
  const [base, accent] = letter.normalize('NFD');
  const command = accent === undefined ? undefined : ACCENTS[accent];
  if (base !== undefined && command !== undefined) return `\\${command}{${base}}`;
  return `\\text{${PLAIN_LETTERS[letter] ?? letter}}`;
}

const ACCENTS: Readonly<Record<string, string>> = {
  '\u0300': 'grave',
  '\u0301': 'acute',
  '\u0302': 'hat',
  '\u0303': 'tilde',
  '\u0308': 'ddot',
  '\u030a': 'mathring',
};
const PLAIN_LETTERS: Readonly<Record<string, string>> = {
  ß: '\\ss{}',
  æ: '\\ae{}',
  Æ: '\\AE{}',
  ø: '\\o{}',
  Ø: '\\O{}',
  ð: 'd',
  Ð: 'D',
  þ: 'th',
  Þ: 'Th',
  ç: '\\c{c}',
  Ç: '\\c{C}',
};

function typeset(node: Expression): string {
  switch (node.kind) {
    case 'number':
      return node.text;
    case 'mark':
      return typesetMark(node.name);
    case 'constant':
      return node.name === 'i' ? 'i' : '\\pi';
    case 'unit':
      return node.sign ? (UNIT_SIGNS[node.name] ?? '') : `\\mathrm{${node.name}}`;
    case 'quantity':
      return typesetQuantity(node);
    case 'compound':
      return node.parts.map(typesetQuantity).join('\\,');
    case 'sum':
      return node.terms
        .map((term, index) =>
          index === 0 ? typeset(term.value) : term.sign + bracketNegative(term.value),
        )
        .join('');
    case 'product':
      return typesetProduct(node);
    case 'negative':
      return `-${typeset(node.value)}`;
    case 'power': {
      const base = BRACKETED_BASES.has(node.base.kind)
        ? inBrackets(typeset(node.base))
        : typeset(node.base);
      return `{${base}}^{${typeset(unwrap(node.exponent))}}`;
    }
    case 'call':
      return typesetCall(node.name, node.args);
    case 'application':
      return typesetMark(node.callee.name) + typesetArguments(node.args);
    case 'each': {
      const [first, last] = [typeset(unwrap(node.first)), typeset(unwrap(node.last))];
      const counter = `${typesetMark(node.counter.name)}=${first}`;
      return `\\left[${typeset(unwrap(node.value))}\\right]_{${counter}}^{${last}}`;
    }
    case 'equation':
      return `${typeset(node.left)}=${typeset(node.right)}`;
    case 'list':
      return `\\left[${node.items.map(typeset).join(',\\,')}\\right]`;
    case 'index':
      return `${typeset(node.list)}\\left[${typeset(unwrap(node.index))}\\right]`;
    case 'group':
      return inBrackets([node.value, ...node.more].map(typeset).join(',\\,'));
    case 'root':
      return `\\sqrt{${typeset(unwrap(node.value))}}`;
  }
}

function bracketNegative(node: Expression): string {
  return node.kind === 'negative' ? `\\left(${typeset(node)}\\right)` : typeset(node);
}

/** What stands in a place that groups by itself needs no brackets. */
function unwrap(node: Expression): Expression {
  return node.kind === 'group' ? unwrap(node.value) : node;
}

/** A thin space stands before a unit, and none before a degree sign. */
function unitGap(unit: Expression): string {
  return (unit.kind === 'power' ? unit.base : unit).kind === 'unit' && !isUnitSign(unit)
    ? '\\,'
    : '';
}

function isUnitSign(unit: Expression): boolean {
  return unit.kind === 'unit' && unit.sign;
}

function typesetQuantity(node: QuantityNode): string {
  const count =
    node.denominator === null
      ? node.numerator.text
      : `\\tfrac{${node.numerator.text}}{${node.denominator.text}}`;
  return (node.whole?.text ?? '') + count + unitGap(node.unit) + typeset(node.unit);
}

/** Read left to right, as it is evaluated: each `/` puts all that stands before it over what follows. */
function typesetProduct(node: ProductNode): string {
  return node.factors.reduce((before, factor, index) => {
    // What a fraction bar groups by itself needs no brackets over it either.
    if (index === 0) {
      const alone = node.factors[1]?.operator === '/';
      return typeset(alone ? unwrap(factor.value) : factor.value);
    }
    if (factor.operator === '/') return `\\frac{${before}}{${typeset(unwrap(factor.value))}}`;
    if (factor.operator === '*') return `${before}\\cdot ${bracketNegative(factor.value)}`;
    const next = typeset(factor.value);
    // A power before the degree sign would be a second superscript.
    if (next.startsWith('^')) return `{${before}}${next}`;
    // A letter must not run into the command, or the word, before it.
    const meets = /[A-Za-z}]$/.test(before) && /^[A-Za-z]/.test(next);
    return before + (meets ? '\\,' : unitGap(factor.value)) + next;
  }, '');
}

function typesetCall(name: string, args: readonly Expression[]): string {
  const [first] = args;
  if (first !== undefined && args.length === 1) {
    if (name === 'sqrt') return `\\sqrt{${typeset(unwrap(first))}}`;
    if (name === 'cbrt') return `\\sqrt[3]{${typeset(unwrap(first))}}`;
    if (name === 'abs') return `\\left|${typeset(unwrap(first))}\\right|`;
    if (name === 'floor') return `\\left\\lfloor ${typeset(unwrap(first))}\\right\\rfloor `;
    if (name === 'conj') return `\\overline{${typeset(unwrap(first))}}`;
  }
  const command = COMMANDS[name] ?? `\\operatorname{${name}}`;
  return command + typesetArguments(args);
}

function typesetArguments(args: readonly Expression[]): string {
  const [first, second] = args;
  return inBrackets(
    second === undefined && first !== undefined
      ? typeset(unwrap(first))
      : args.map(typeset).join(',\\,'),
  );
}

const inBrackets = (tex: string): string => `\\left(${tex}\\right)`;

/** What a raised exponent would seem to belong to only in part. */
const BRACKETED_BASES: ReadonlySet<Expression['kind']> = new Set([
  'call',
  'application',
  'each',
  'root',
]);

const UNIT_SIGNS: Readonly<Record<string, string>> = {
  deg: '^{\\circ}',
  min: '^{\\prime}',
  sec: '^{\\prime\\prime}',
};
