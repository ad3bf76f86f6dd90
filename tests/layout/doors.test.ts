import { expect, test } from 'vitest';
import { doorsLeftOut, listEndpoints, listPages } from './doors';

test('pages and endpoints are found where the framework finds them', () => {
  expect(listPages()).toContain('/notebooks/[id]/versions/[number]');
  expect(listPages()).toContain('/');
  expect(listEndpoints()).toContainEqual({ method: 'PATCH', pattern: '/api/notebooks/[id]' });
  expect(listEndpoints()).toContainEqual({ method: 'POST', pattern: '/api/auth/[...nextauth]' });
});

test('a door is opened by its own method and address, and of two by the more precise', () => {
  const doors = [
    { method: 'GET', pattern: '/a/[id]' },
    { method: 'GET', pattern: '/a/next' },
    { method: 'POST', pattern: '/a/[id]' },
  ];
  const get = (address: string) => ({ method: 'GET', address });
  expect(doorsLeftOut(doors, [get('/a/next?b=1')])).toEqual(['GET /a/[id]', 'POST /a/[id]']);
  expect(doorsLeftOut(doors, [get('/a/b/c'), get('/a/')])).toHaveLength(3);
  expect(doorsLeftOut(doors, [get('/a/7'), { method: 'POST', address: '/a/next' }])).toEqual([
    'GET /a/next',
  ]);
});
