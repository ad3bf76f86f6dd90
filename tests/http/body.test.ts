import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { Failure } from '@/lib/access';
import { check, readJson } from '@/lib/http/body';

async function failureOf(work: () => unknown): Promise<Failure> {
  try {
    await work();
  } catch (error) {
    if (error instanceof Failure) return error;
    throw error;
  }
  throw new Error('It did not fail.');
}

const post = (body: BodyInit, type = 'application/json') =>
  new Request('http://localhost/', { method: 'POST', body, headers: { 'content-type': type } });

describe('a body', () => {
  it('is read as JSON, whatever parameters and case its type has', async () => {
    expect(await readJson(post('{"a":1}', 'Application/JSON; charset=utf-8'), 100)).toEqual({
      a: 1,
    });
  });

  it.each([
    ['text/plain', '{"a":1}', 'wrong-type'],
    ['application/jsonp', '{"a":1}', 'wrong-type'],
    ['application/json', '', 'unreadable'],
    ['application/json', '{"a":', 'unreadable'],
    ['application/json', new Uint8Array([0x22, 0xff, 0x22]), 'unreadable'],
    ['application/json', `"${'x'.repeat(100)}"`, 'too-large'],
  ])('of type %s with %j fails as it should', async (type, body, code) => {
    expect((await failureOf(() => readJson(post(body, type), 100))).code).toBe(code);
  });

  it('is not read on past the limit, though it says nothing of its length', async () => {
    let sent = 0;
    const endless = new ReadableStream<Uint8Array>({
      pull(controller) {
        sent += 1;
        controller.enqueue(new Uint8Array(1000));
      },
    });
    const request = new Request('http://localhost/', {
      method: 'POST',
      body: endless,
      headers: { 'content-type': 'application/json' },
      duplex: 'half',
    } as RequestInit);
    expect((await failureOf(() => readJson(request, 5000))).code).toBe('too-large');
    expect(sent).toBeLessThan(10);
  });
});

describe('what a check says', () => {
  const schema = z.strictObject({
    title: z.string().max(5),
    count: z.int().max(3).optional(),
    unit: z.enum(['mm', 'cm']).optional(),
    list: z.array(z.string()).max(2).optional(),
  });
  it.each([
    [{}, 'title: It is missing; expected a text.'],
    [[], 'It is a list; expected an object.'],
    [null, 'It is null; expected an object.'],
    [{ title: 7 }, 'title: It is a number; expected a text.'],
    [{ title: 'abcdef' }, 'title: It has 6 characters; at most 5 are allowed.'],
    [{ title: 'a', count: 4 }, 'count: It is above 3, which is the most that is allowed.'],
    [{ title: 'a', unit: 'm' }, 'unit: It is not one of mm, cm.'],
    [{ title: 'a', list: ['', '', ''] }, 'list: It has 3 entries; at most 2 are allowed.'],
    [{ title: 'a', list: ['', 1] }, 'list.1: It is a number; expected a text.'],
    [{ title: 'a', x: 1 }, 'There is no field “x” here.'],
    [{ x: 1 }, 'title: It is missing; expected a text. (and 1 more)'],
  ])('of %j is “%s”', async (sent, sentence) => {
    const failure = await failureOf(() => check(schema, sent));
    expect([failure.code, failure.message]).toEqual(['invalid', sentence]);
  });

  it('names at most twenty faults of a request that is all wrong', async () => {
    const failure = await failureOf(() => check(z.array(z.string()), Array<number>(500).fill(1)));
    expect(failure.extra.fields).toHaveLength(20);
  });
});
