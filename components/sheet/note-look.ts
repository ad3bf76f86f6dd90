/** How a note is set. */
export const NOTE_LOOK =
  'prose-note max-w-prose font-serif text-note [overflow-wrap:anywhere]' as const;
