import type { Letter } from './letter';

/** Longest line of text that every mail program shows without a break of its own (RFC 5322, 2.1.1). */
const WIDTH = 72;

/**
 * A letter as plain text, complete by itself. An address to go to stands alone on its line and is
 * never broken, so that every program makes it one link.
 */
export function writeText(letter: Letter): string {
  const { name, paragraphs, action, reason } = letter;
  return [
    ...(name === undefined ? [] : [`${oneLine(name)},`]),
    ...paragraphs.map(wrapped),
    ...(action === undefined ? [] : [`${oneLine(action.label)}:\n${action.url}`]),
    `-- \n${wrapped(reason)}`,
  ].join('\n\n');
}

function wrapped(paragraph: string): string {
  const lines: string[] = [];
  let line = '';
  for (const word of oneLine(paragraph).split(' ')) {
    if (line !== '' && line.length + 1 + word.length > WIDTH) {
      lines.push(line);
      line = word;
    } else line = line === '' ? word : `${line} ${word}`;
  }
  return [...lines, line].join('\n');
}

/** What people wrote may hold line breaks; a letter's own structure is not theirs to make. */
export function oneLine(text: string): string {
  return text.replace(/[\p{Cc}\u2028\u2029\s]+/gu, ' ').trim();
}
