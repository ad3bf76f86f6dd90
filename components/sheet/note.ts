import katex from 'katex';
import MarkdownIt from 'markdown-it';

/** Markdown of a note cell, without raw HTML or pictures, with TeX between `$` and `$$`. */
const markdown = new MarkdownIt({ html: false, linkify: false, typographer: false });
markdown.disable('image');

const KATEX = {
  output: 'htmlAndMathml',
  throwOnError: false,
  trust: false,
  strict: 'ignore',
} as const;
/** Notes are typeset in the browser: KaTeX's own guards against macros that grow. */
const GUARDS = { maxExpand: 1000, maxSize: 20, errorColor: 'var(--ruddle)' } as const;

markdown.inline.ruler.before('escape', 'tex', (state, silent) => {
  const { src, pos } = state;
  if (src.charAt(pos) !== '$') return false;
  const fence = src.startsWith('$$', pos) ? '$$' : '$';
  const from = pos + fence.length;
  const to = src.indexOf(fence, from);
  const tex = to < 0 ? '' : src.slice(from, to);
  // A price is no formula: what stands between single signs must not begin or end with a space.
  if (
    tex.trim() === '' ||
    (fence === '$' && (/^\s|\s$/.test(tex) || /\d/.test(src.charAt(to + 1))))
  ) {
    return false;
  }
  if (!silent) {
    const token = state.push('tex', '', 0);
    token.content = tex.trim();
    token.markup = fence;
  }
  state.pos = to + fence.length;
  return true;
});

markdown.renderer.rules.tex = (tokens, index) => {
  const token = tokens[index];
  if (!token) return '';
  return katex.renderToString(token.content, {
    ...KATEX,
    ...GUARDS,
    displayMode: token.markup === '$$',
  });
};

/** The page's own heading is the title of the notebook, so a note's begin one level below. */
const lower = (tag: string) => `h${Math.min(6, Number(tag.slice(1)) + 1)}`;
for (const rule of ['heading_open', 'heading_close'] as const) {
  markdown.renderer.rules[rule] = (tokens, index) => {
    const tag = lower(tokens[index]?.tag ?? 'h1');
    return rule === 'heading_open' ? `<${tag}>` : `</${tag}>\n`;
  };
}

markdown.renderer.rules.link_open = (tokens, index, options, _environment, self) => {
  tokens[index]?.attrSet('rel', 'noopener noreferrer nofollow');
  return self.renderToken(tokens, index, options);
};

/** The HTML of a note. Safe to set: raw HTML is escaped, and only safe schemes become links. */
export function renderNote(source: string): string {
  return markdown.render(source);
}
