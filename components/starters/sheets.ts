import type { NotebookCell, NotebookSettings } from '@/lib/notebooks/content';
import { DEFAULT_NOTEBOOK_SETTINGS } from '@/lib/notebooks/content-values';

/** What a starter puts onto an empty sheet. */
export interface Starter {
  name: 'voussoirs' | 'tracery' | 'pavement';
  title: string;
  /** What is on it, in a sentence. */
  about: string;
  settings: NotebookSettings;
  cells: readonly NotebookCell[];
}

const joined = (lines: readonly string[]) => lines.join('\n');
const heading = (id: string, text: string): NotebookCell => ({
  id,
  kind: 'section',
  source: text,
});
const note = (id: string, ...lines: string[]): NotebookCell => ({
  id,
  kind: 'note',
  source: joined(lines),
});
const dimension = (id: string, ...lines: string[]): NotebookCell => ({
  id,
  kind: 'dimension',
  source: joined(lines),
});

const settingsWith = (step: string): NotebookSettings => ({ ...DEFAULT_NOTEBOOK_SETTINGS, step });

const voussoirs: Starter = {
  name: 'voussoirs',
  title: 'A ring of voussoirs',
  about: 'Span, depth of the ring and joint give the stones: both chords, the bed, the rise.',
  settings: settingsWith('0.5 mm'),
  cells: [
    heading('given', 'Given'),
    note(
      'given-note',
      'A round opening, turned with $n$ equal stones. Write your own clear span, depth of the ring,',
      'number of stones and joint here; everything below follows.',
    ),
    dimension(
      'given-lines',
      'span = 4100 mm            # clear, measured on site',
      'depth = 350 mm            # soffit to back of the ring',
      'n = 17                    # stones in the ring',
      'j = 4 mm                  # joint, parallel',
    ),
    heading('ring', 'Ring'),
    dimension(
      'ring-lines',
      'R_in = span/2             # soffit',
      'R_out = R_in + depth      # back',
      'wedge = turn/n            # from centre line to centre line of two joints',
    ),
    heading('stone', 'One stone'),
    note(
      'stone-note',
      'Each bed lies half a joint off its radius, so the chord is not simply shortened by the joint.',
      'The last line shows that: the stone is longer than chord less joint.',
    ),
    dimension(
      'stone-lines',
      'S = sin(wedge/2)',
      'C = cos(wedge/2)',
      'v_in = 2 (S sqrt(R_in^2 - j^2/4) - C j/2)      # chord at the soffit',
      'v_out = 2 (S sqrt(R_out^2 - j^2/4) - C j/2)    # chord at the back',
      'bed = sqrt(R_out^2 - j^2/4) - sqrt(R_in^2 - j^2/4)',
      'h_in = sagitta(R_in, wedge)                    # hollow of the soffit over one pitch',
      'v_in > chord(R_in, wedge) - j',
    ),
    heading('closing', 'Closing'),
    note(
      'closing-note',
      'What is missed after a full circuit when every pitch is cut to the nearest half millimetre',
      'and stepped on from the one before. Set out by running dimensions from one datum instead.',
    ),
    dimension(
      'closing-lines',
      'pitch = chord(R_in, wedge)',
      'miss = n round(pitch, 0.5 mm) - n pitch',
    ),
  ],
};

const tracery: Starter = {
  name: 'tracery',
  title: 'A traceried circle',
  about: 'A circle of n lights: pitch, foils between mullions, eye, and chords to check across.',
  settings: settingsWith('0.5 mm'),
  cells: [
    heading('given', 'Given'),
    note(
      'given-note',
      'Lights on a circle about the centre O, counted from the top. Seventeen is one of the divisions',
      'that straightedge and compass reach exactly; seven, nine, eleven and thirteen are not.',
    ),
    dimension(
      'given-lines',
      'R = 1500 mm               # centre O to the middle of a light',
      'n = 17                    # lights',
      'mullion = 60 mm           # least stone between two lights',
    ),
    heading('lights', 'Lights'),
    dimension(
      'lights-lines',
      'p = 2 R sin(turn/(2 n))   # pitch, middle to middle',
      'p == chord(R, turn/n)',
      'f = p/2 - mullion/2       # radius of a foil',
      'eye = R - f - mullion     # radius of the eye',
      'glass = R + f             # centre to the top of a light',
    ),
    heading('points', 'From the centre lines'),
    note(
      'points-note',
      'The first two lights after the top one, as offsets from both centre lines.',
    ),
    dimension(
      'points-lines',
      'x1 = R sin(turn/n)',
      'y1 = R cos(turn/n)',
      'x2 = R sin(2 turn/n)',
      'y2 = R cos(2 turn/n)',
      'x1^2 + y1^2 == R^2',
    ),
    heading('checks', 'Checks across'),
    note(
      'checks-note',
      'Chords from the top light to the others: measure these on the full-size drawing.',
    ),
    dimension('checks-lines', ...[2, 3, 4, 5, 6, 7, 8].map((k) => `k${k} = chord(R, ${k} turn/n)`)),
  ],
};

const pavement: Starter = {
  name: 'pavement',
  title: 'A pavement field',
  about: 'Courses of a fifteen-fold court: radii from the course width, cut edges, closing check.',
  settings: settingsWith('0.1 mm'),
  cells: [
    heading('given', 'Given'),
    note(
      'given-note',
      'Courses of equal width round a centre O, with radial joints. Fifteen parts come from the',
      'triangle and the pentagon, so they can be struck exactly.',
    ),
    dimension(
      'given-lines',
      'w = 1500 mm               # width of a course',
      'n = 15                    # slabs in each course',
    ),
    heading('courses', 'Courses'),
    dimension('courses-lines', 'R1 = w', 'R2 = 2 w', 'R3 = 3 w', 'R4 = 4 w'),
    heading('edges', 'Cut edges'),
    note(
      'edges-note',
      'The straight outer edge of a slab in each course; an inner edge is that of the course before.',
    ),
    dimension(
      'edges-lines',
      'part = turn/n',
      'a1 = chord(R1, part)',
      'a2 = chord(R2, part)',
      'a3 = chord(R3, part)',
      'a4 = chord(R4, part)',
      'a4 == 4 a1',
      'h4 = sagitta(R4, part)    # middle of the outer edge to the arc',
      'b4 = w cos(part/2)        # width of a slab along its middle',
    ),
    heading('closing', 'Closing'),
    note('closing-note', 'Fifteen rounded edges against the true sum of the outer course.'),
    dimension('closing-lines', 'outline = n a4', 'short = outline - n round(a4, 0.1 mm)'),
  ],
};

/** Three pieces of work to begin from; each stands on its own. */
export const STARTERS: readonly Starter[] = [voussoirs, tracery, pavement];

export const findStarter = (name: string): Starter | undefined =>
  STARTERS.find((starter) => starter.name === name);
