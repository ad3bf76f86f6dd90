import katex from 'katex';
import { memo } from 'react';

interface TexProps {
  tex: string;
  display?: boolean;
  className?: string;
}

/** TeX set by KaTeX, with MathML beside it for screen readers. What KaTeX cannot set is shown as text. */
export const Tex = memo(function Tex({ tex, display = false, className }: TexProps) {
  const html = katex.renderToString(tex, {
    displayMode: display,
    output: 'htmlAndMathml',
    throwOnError: false,
    errorColor: 'var(--ruddle)',
    strict: 'ignore',
    trust: false,
    maxExpand: 1000,
    maxSize: 20,
  });
  return <span className={className} dangerouslySetInnerHTML={{ __html: html }} />;
});
