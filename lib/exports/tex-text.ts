/**
 * Plain text as LaTeX text that sets it and does nothing else. The output is ASCII: what TeX's own fonts lack is
 * written by command or, failing that, by its code point, so that any text compiles with any engine.
 */
export function escapeTex(text: string): string {
  let escaped = '';
  for (const character of text.normalize('NFC')) escaped += escapeCharacter(character);
  return escaped;
}

const COMMANDS: Readonly<Record<string, string>> = {
  '\\': '\\textbackslash{}',
  '{': '\\{',
  '}': '\\}',
  $: '\\$',
  '&': '\\&',
  '#': '\\#',
  '%': '\\%',
  _: '\\_',
  '^': '\\textasciicircum{}',
  '~': '\\textasciitilde{}',
  '<': '$<$',
  '>': '$>$',
  '|': '$|$',
  '"': "''",
  // These would join with a neighbour into another sign.
  '-': '-{}',
  '`': '`{}',
  "'": "'{}",
  ',': ',{}',
  '?': '?{}',
  '!': '!{}',
  '√': '$\\surd$',
  π: '$\\pi$',
  '°': '$^{\\circ}$',
  º: '$^{\\circ}$',
  '×': '$\\times$',
  '÷': '$\\div$',
  '·': '$\\cdot$',
  '⋅': '$\\cdot$',
  '−': '$-$',
  '±': '$\\pm$',
  '²': '$^{2}$',
  '³': '$^{3}$',
  '¹': '$^{1}$',
  '½': '$\\frac{1}{2}$',
  '¼': '$\\frac{1}{4}$',
  '¾': '$\\frac{3}{4}$',
  '≤': '$\\le$',
  '≥': '$\\ge$',
  '≠': '$\\ne$',
  '≈': '$\\approx$',
  '∞': '$\\infty$',
  '→': '$\\to$',
  '←': '$\\leftarrow$',
  '↔': '$\\leftrightarrow$',
  '∠': '$\\angle$',
  '⌀': '$\\oslash$',
  '′': "$'$",
  '″': "$''$",
  '…': '\\ldots{}',
  '–': '--',
  '—': '---',
  '‘': '`',
  '’': "'",
  '“': '``',
  '”': "''",
  '«': '$\\ll$',
  '»': '$\\gg$',
  '•': '$\\bullet$',
  '§': '\\S{}',
  '¶': '\\P{}',
  '©': '\\copyright{}',
  '£': '\\pounds{}',
  '€': 'EUR',
  '™': '$^{\\mathrm{TM}}$',
  ß: '\\ss{}',
  æ: '\\ae{}',
  Æ: '\\AE{}',
  œ: '\\oe{}',
  Œ: '\\OE{}',
  ø: '\\o{}',
  Ø: '\\O{}',
  ł: '\\l{}',
  Ł: '\\L{}',
  ı: '\\i{}',
  å: '\\aa{}',
  Å: '\\AA{}',
  '\u00a0': '~',
  '\u2009': '\\,',
  '\u202f': '\\,',
  '\t': ' ',
  '\n': ' ',
  '\r': ' ',
};

const ACCENTS: Readonly<Record<string, string>> = {
  '\u0300': '`',
  '\u0301': "'",
  '\u0302': '^',
  '\u0303': '~',
  '\u0304': '=',
  '\u0306': 'u',
  '\u0307': '.',
  '\u0308': '"',
  '\u030a': 'r',
  '\u030b': 'H',
  '\u030c': 'v',
  '\u0327': 'c',
  '\u0328': 'k',
};

const GREEK: Readonly<Record<string, string>> = {
  α: '\\alpha',
  β: '\\beta',
  γ: '\\gamma',
  δ: '\\delta',
  ε: '\\epsilon',
  ζ: '\\zeta',
  η: '\\eta',
  θ: '\\theta',
  ι: '\\iota',
  κ: '\\kappa',
  λ: '\\lambda',
  μ: '\\mu',
  µ: '\\mu',
  ν: '\\nu',
  ξ: '\\xi',
  ρ: '\\rho',
  σ: '\\sigma',
  ς: '\\varsigma',
  τ: '\\tau',
  υ: '\\upsilon',
  φ: '\\phi',
  χ: '\\chi',
  ψ: '\\psi',
  ω: '\\omega',
  Γ: '\\Gamma',
  Δ: '\\Delta',
  Θ: '\\Theta',
  Λ: '\\Lambda',
  Ξ: '\\Xi',
  Π: '\\Pi',
  Σ: '\\Sigma',
  Υ: '\\Upsilon',
  Φ: '\\Phi',
  Ψ: '\\Psi',
  Ω: '\\Omega',
};

function escapeCharacter(character: string): string {
  const command = COMMANDS[character];
  if (command !== undefined) return command;
  if (/^[\x20-\x7e]$/.test(character)) return character;
  const greek = GREEK[character];
  if (greek !== undefined) return `$${greek}$`;
  const [base, accent, more] = character.normalize('NFD');
  const accentCommand = accent === undefined || more !== undefined ? undefined : ACCENTS[accent];
  // An ogonek needs another font encoding than TeX's own.
  if (
    base !== undefined &&
    /^[A-Za-z]$/.test(base) &&
    accentCommand !== undefined &&
    accentCommand !== 'k'
  ) {
    return accent === '\u0327' || !'ij'.includes(base)
      ? `\\${accentCommand}{${base}}`
      : `\\${accentCommand}{\\${base}}`;
  }
  const code = character.codePointAt(0) ?? 0;
  // Control characters have no look; the rest is named.
  return code < 0x20 || (code >= 0x7f && code < 0xa0)
    ? ''
    : `[U+${code.toString(16).toUpperCase().padStart(4, '0')}]`;
}

/** Text in the typewriter face, broken wherever the line is full. */
export function typewriter(text: string): string {
  const pieces = [...text].map((character) => escapeTex(character));
  return `\\texttt{${pieces.map((piece) => (piece === ' ' ? '\\ ' : piece)).join('\\allowbreak{}')}}`;
}

/** A decimal string, which may be thousands of digits long, in groups between which a line may break. */
export function breakableDigits(decimal: string): string {
  return decimal.length <= 40 ? decimal : (decimal.match(/.{1,10}/g) ?? []).join('\\allowbreak{}');
}
