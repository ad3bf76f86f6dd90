/** A call of POST /api/evaluate that runs as it stands in Node 20 or later. */
export function snippetFor(server: string): string {
  return `const answer = await fetch('${server}/api/evaluate', {
  method: 'POST',
  headers: {
    authorization: \`Bearer \${process.env.SURDWORK_KEY}\`,
    'content-type': 'application/json',
  },
  body: JSON.stringify({
    expression: 'sqrt(5+2*sqrt(6))',
    settings: { digits: 20, unit: 'mm' },
  }),
});

if (!answer.ok) throw new Error((await answer.json()).detail);

const { result } = await answer.json();
console.log(result.exact.text); // sqrt(2)+sqrt(3)
console.log(result.decimal.re, result.degree);
`;
}
