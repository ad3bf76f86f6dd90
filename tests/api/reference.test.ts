import { describe, expect, it } from 'vitest';
import { CONSTANTS, FUNCTIONS, UNITS } from '@/lib/language/names';
import { Visitor, newcomer } from './support/visitor';

const WORDS = [...FUNCTIONS, ...UNITS, ...CONSTANTS];

describe('the reference page', () => {
  it('has an anchor and the meaning of every word of the language', async () => {
    const { status, text } = await new Visitor().get('/help');
    expect(status).toBe(200);
    const missing = WORDS.filter(({ name }) => !text.includes(`<article id="${name}"`));
    expect(missing.map(({ name }) => name)).toEqual([]);
  });

  it('shows results of this server, and no sample that fails', async () => {
    const { text } = await new Visitor().get('/help');
    // sqrt(5 + 2 sqrt(6)) = √2 + √3 is common knowledge.
    expect(text.includes('\\sqrt{2}+\\sqrt{3}')).toBe(true);
    // The chord of a seventeenth of a turn is 0.36749903563 of the radius.
    expect(text.includes('440.9988427')).toBe(true);
  });

  it('offers to put samples into a notebook only to somebody who may have one', async () => {
    expect((await new Visitor().get('/help')).text.includes('Put into my notebook')).toBe(false);
    const person = await newcomer('Maren');
    expect((await person.get('/help')).text.includes('Put into my notebook')).toBe(true);
  });

  it('does not say the title of a notebook that is not one’s own', async () => {
    const owner = await newcomer('Owain');
    const made = await owner.post('/api/notebooks', { title: 'Kept to myself' });
    const path = `/help?from=${String(made.json.id)}`;
    expect((await owner.get(path)).text.includes('Kept to myself')).toBe(true);
    const stranger = await newcomer('Strand');
    expect((await stranger.get(path)).text.includes('Kept to myself')).toBe(false);
  });
});
