export interface Sample {
  title: string;
  lines: string;
}

const sample = (title: string, ...lines: string[]): Sample => ({ title, lines: lines.join('\n') });

/** A pentagonal light: what the live cell holds until somebody writes. */
export const FIRST = sample(
  'Five-light oculus',
  'R = 1200 mm',
  's = 2 R sin(turn/10)',
  's^2 == R^2 (5 - sqrt(5))/2',
);

/** Lines that are put into the live cell with one press; each shows another side of the work. */
export const SAMPLES: readonly Sample[] = [
  FIRST,
  sample(
    'Pitch of 17 lights',
    'R = 1500 mm',
    'p = 2 R sin(turn/34)',
    'miss = 17 round(p, 0.5 mm) - 17 p',
  ),
  sample('Hollow of a voussoir', 'R = 2050 mm', 'c = chord(R, turn/24)', 'h = sagitta(R, turn/24)'),
  sample('Seven parts, nearly', 'r = 450 mm', 's = chord(r, turn/7)', 'q = standin(s, 0.02 mm, r)'),
  sample('Roots that fold', 'sqrt(5 + 2 sqrt(6))'),
  sample('A slip, caught', 'R = 1200 mm', 'R + 15 deg'),
];
