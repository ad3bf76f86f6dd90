import { describe, expect, it } from 'vitest';
import { MemoryStore, keyOfAnswer, layered } from '@/lib/evaluation/cache';

describe('the store in memory', () => {
  it('gives back what was written and null for what was not', async () => {
    const store = new MemoryStore();
    await store.write('a', '1');
    expect(await store.read('a')).toBe('1');
    expect(await store.read('b')).toBeNull();
  });

  it('forgets what was not asked for longest', async () => {
    const store = new MemoryStore(20);
    for (const key of ['a', 'b', 'c', 'd', 'e', 'f', 'g', 'h', 'i']) {
      await store.write(key, '12');
      await store.read('a');
    }
    await store.write('j', '12');
    await store.write('k', '12');
    expect(await store.read('a')).toBe('12');
    expect(await store.read('b')).toBeNull();
    expect(await store.read('k')).toBe('12');
  });

  it('counts a key written twice once, and keeps nothing that is too large for it', async () => {
    const store = new MemoryStore(80);
    for (let time = 0; time < 20; time += 1) await store.write('a', '1234567890');
    await store.write('b', '1');
    await store.write('large', 'x'.repeat(11));
    expect(await store.read('a')).toBe('1234567890');
    expect(await store.read('b')).toBe('1');
    expect(await store.read('large')).toBeNull();
  });
});

describe('layers', () => {
  it('ask the lasting store once and remember its answer near by', async () => {
    const [near, far] = [new MemoryStore(), new MemoryStore()];
    await far.write('a', '1');
    const store = layered(near, far);
    expect(await store.read('a')).toBe('1');
    expect(await near.read('a')).toBe('1');
    await store.write('b', '2');
    expect(await far.read('b')).toBe('2');
  });
});

describe('keys', () => {
  it('differ with the program and with anything that was asked', () => {
    const asked = { expression: '1', cells: [], settings: { digits: 30 } };
    const keys = [
      keyOfAnswer('p', asked),
      keyOfAnswer('q', asked),
      keyOfAnswer('p', { ...asked, expression: '2' }),
      keyOfAnswer('p', { ...asked, settings: { digits: 31 } }),
    ];
    expect(new Set(keys).size).toBe(4);
    for (const key of keys) expect(key).toMatch(/^[0-9a-f]{64}$/);
  });
});
