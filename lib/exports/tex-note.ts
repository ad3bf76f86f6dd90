import katex from 'katex';
import MarkdownIt from 'markdown-it';
import { escapeTex, typewriter } from './tex-text';

type Token = ReturnType<MarkdownIt['parse']>[number];

const markdown = new MarkdownIt('default', { html: false, linkify: false });

/**
 * A note in Markdown as LaTeX text.
 * Headings, paragraphs, lists, quotations, emphasis, code and mathematics between `$` keep their form; a link becomes
 * its text and address, a picture its description, a table its rows. Whatever else the note holds is set as text: no
 * command of the note's own reaches TeX, apart from mathematics made of harmless commands only.
 */
export function noteTex(source: string): string {
  const mathematics: string[] = [];
  const guarded = guardMathematics(source, mathematics);
  return new NoteWriter(mathematics).blocks(markdown.parse(guarded, {}));
}

/** Private-use characters that stand for a formula while Markdown is read, so that it leaves `_` and `*` in it alone. */
const [BEFORE, AFTER] = ['\ue000', '\ue001'];

function guardMathematics(source: string, mathematics: string[]): string {
  const clean = source.replaceAll(BEFORE, '').replaceAll(AFTER, '');
  return clean.replace(
    /(`+)[^`][\s\S]*?\1|\$\$([^$]+)\$\$|\$([^$\n]+)\$/g,
    (whole, code: string | undefined, display: string | undefined, inline: string | undefined) => {
      if (code !== undefined) return whole;
      const formula = (display ?? inline ?? '').trim();
      if (!isHarmless(formula)) return whole;
      mathematics.push(display === undefined ? `$${formula}$` : `\\[${formula}\\]`);
      return `${BEFORE}${mathematics.length - 1}${AFTER}`;
    },
  );
}

const HARMLESS = new Set(
  (
    'frac tfrac dfrac sqrt cdot times div pm mp le ge ne leq geq neq approx equiv sim to infty angle circ degree ldots cdots quad qquad ' +
    'sin cos tan arcsin arccos arctan min max log exp left right big Big bigl bigr mathrm mathbf mathit text overline underline hat bar vec prime perp parallel triangle ' +
    'alpha beta gamma delta epsilon varepsilon zeta eta theta vartheta iota kappa lambda mu nu xi pi rho sigma tau upsilon phi varphi chi psi omega ' +
    'Gamma Delta Theta Lambda Xi Pi Sigma Upsilon Phi Psi Omega sum prod int cap cup in notin subset forall exists lfloor rfloor lceil rceil'
  ).split(' '),
);

/**
 * Whether a formula can be handed to TeX: only ASCII, only commands of the list, and well formed, for which the
 * typesetter of the screen is the judge. TeX's notation `^^` for characters is refused, as it can spell a command.
 */
function isHarmless(formula: string): boolean {
  if (
    formula === '' ||
    formula.length > 2_000 ||
    !/^[\x20-\x7e\n]*$/.test(formula) ||
    /\^\^|[%#&~$]|\n\s*\n/.test(formula)
  )
    return false;
  const commands = formula.match(/\\(?:[A-Za-z]+|[^])/g) ?? [];
  if (
    !commands.every(
      (command) =>
        HARMLESS.has(command.slice(1)) ||
        ['\\,', '\\;', '\\:', '\\!', '\\ ', '\\{', '\\}'].includes(command),
    )
  )
    return false;
  if (/\\text\s*\{[^{}]*[_^\\]/.test(formula) || formula.includes('\\degree')) return false;
  try {
    katex.renderToString(formula, { throwOnError: true, strict: 'ignore', trust: false });
    return true;
  } catch {
    return false;
  }
}

class NoteWriter {
  private lists: string[] = [];

  constructor(private readonly mathematics: readonly string[]) {}

  blocks(tokens: readonly Token[]): string {
    return tokens
      .map((token) => this.block(token))
      .join('')
      .replace(/\n{3,}/g, '\n\n')
      .trim();
  }

  private block(token: Token): string {
    switch (token.type) {
      case 'heading_open':
        return '\n\n\\noindent\\textbf{';
      case 'heading_close':
        return '}\\par\n\n';
      case 'paragraph_open':
        return token.hidden ? '' : '\n\n';
      case 'paragraph_close':
        return token.hidden ? '\n' : '\n\n';
      case 'inline':
        return this.inline(token.children ?? []);
      case 'bullet_list_open':
      case 'ordered_list_open':
        return this.openList(token.type === 'bullet_list_open' ? 'itemize' : 'enumerate');
      case 'bullet_list_close':
      case 'ordered_list_close':
        return this.closeList();
      case 'list_item_open':
        return '\n\\item{} ';
      case 'blockquote_open':
        return '\n\n\\begingroup\\itshape ';
      case 'blockquote_close':
        return '\\par\\endgroup\n\n';
      case 'fence':
      case 'code_block':
        return `\n\n${token.content
          .replace(/\n$/, '')
          .split('\n')
          .map((line) => `\\noindent ${typewriter(line)}\\par`)
          .join('\n')}\n\n`;
      case 'hr':
        return '\n\n\\noindent\\hrulefill\\par\n\n';
      case 'th_close':
      case 'td_close':
        return '\\quad ';
      case 'tr_close':
        return '\\par\n';
      default:
        return '';
    }
  }

  /** LaTeX nests lists four deep; deeper ones go on within the fourth. */
  private openList(environment: string): string {
    const deep = this.lists.length >= 4;
    this.lists.push(deep ? '' : environment);
    return deep ? '' : `\n\\begin{${environment}}`;
  }

  private closeList(): string {
    const environment = this.lists.pop() ?? '';
    return environment === '' ? '' : `\n\\end{${environment}}\n\n`;
  }

  private inline(tokens: readonly Token[]): string {
    return tokens.map((token, index) => this.inlineToken(token, tokens, index)).join('');
  }

  private inlineToken(token: Token, tokens: readonly Token[], index: number): string {
    switch (token.type) {
      case 'text':
        return this.text(token.content);
      case 'code_inline':
        return typewriter(token.content);
      case 'em_open':
        return '\\emph{';
      case 'strong_open':
        return '\\textbf{';
      case 'em_close':
      case 'strong_close':
        return '}';
      case 'softbreak':
        return '\n';
      case 'hardbreak':
        return '\\hfil\\break\n';
      case 'link_close':
        return this.address(tokens, index);
      case 'image':
        return `[${this.inline(token.children ?? [])}]`;
      default:
        return '';
    }
  }

  private address(tokens: readonly Token[], close: number): string {
    const open = tokens.slice(0, close).findLast((token) => token.type === 'link_open');
    const href = open?.attrGet('href') ?? '';
    return href === '' ? '' : ` (${typewriter(href)})`;
  }

  /** Text with the formulas put back at their places. */
  private text(content: string): string {
    return content
      .split(/\ue000(\d+)\ue001/)
      .map((part, index) =>
        index % 2 === 0 ? escapeTex(part) : (this.mathematics[Number(part)] ?? ''),
      )
      .join('');
  }
}
