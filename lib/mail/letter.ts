import { z } from 'zod';

/**
 * A letter as data: what every mail of ours is made of. Plain text throughout; the writers of text
 * and HTML set it, so that both say the same and no text of a person becomes markup.
 */
export const Letter = z.strictObject({
  to: z.string(),
  subject: z.string().max(300),
  /** The name of whoever is written to, where it is known. */
  name: z.string().optional(),
  paragraphs: z.array(z.string()).min(1),
  /** The one thing to do: a button in HTML, an address on a line of its own in text. */
  action: z.strictObject({ label: z.string(), url: z.url() }).optional(),
  /** Why this person gets this letter, at its foot. */
  reason: z.string(),
});
export type Letter = z.infer<typeof Letter>;
