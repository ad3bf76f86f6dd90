import katex from 'katex';
import type { WordFacts } from './word-at';

function element(tag: string, className: string, text = ''): HTMLElement {
  const made = document.createElement(tag);
  made.className = className;
  made.textContent = text;
  return made;
}

/** A sentence in which what stands between backticks is source. */
function sentence(className: string, text: string): HTMLElement {
  const made = element('p', className);
  text.split('`').forEach((part, index) => {
    made.append(index % 2 === 1 ? element('code', 'word-card-source', part) : part);
  });
  return made;
}

function compartment(label: string, value: string): HTMLElement {
  const box = element('div', 'word-card-box');
  box.append(element('dt', 'word-card-label', label), element('dd', 'word-card-figure', value));
  return box;
}

const SORTS = { function: 'function', unit: 'unit', constant: 'constant' } as const;

/** What is known of a name, drawn as a small piece of the sheet: the value large, its figures in compartments. */
export function drawWordCard(facts: WordFacts): HTMLElement {
  const card = element('div', 'word-card');
  const head = element('div', 'word-card-head');
  card.append(head);
  if (facts.kind === 'word') {
    head.append(
      element('span', 'word-card-name', facts.signature),
      element('span', 'word-card-note', SORTS[facts.sort]),
    );
    card.append(sentence('word-card-text', facts.meaning));
    return card;
  }
  const { name, signature, size, tex, decimal, cut, fault, where } = facts.mark;
  head.append(
    element('span', 'word-card-name', signature ?? name),
    element('span', 'word-card-note', `defined in ${where}`),
  );
  if (fault !== null) card.append(sentence('word-card-fault', fault));
  if (tex !== null) {
    const value = element('div', 'word-card-value');
    katex.render(tex, value, {
      output: 'htmlAndMathml',
      throwOnError: false,
      strict: 'ignore',
      trust: false,
      maxExpand: 1000,
      maxSize: 20,
    });
    card.append(value);
  }
  const figures = element('dl', 'word-card-figures');
  if (decimal !== null) figures.append(compartment('Decimal', decimal));
  if (cut !== null) figures.append(compartment('Cut size', cut));
  // A point or a circle has no single decimal: what the index says of it stands here.
  if (decimal === null && fault === null && signature === null)
    figures.append(compartment('Value', size));
  if (figures.hasChildNodes()) card.append(figures);
  return card;
}
