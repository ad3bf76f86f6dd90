import { NotebookContent, type NotebookCell } from '@/lib/notebooks/content';
import { DEFAULT_NOTEBOOK_SETTINGS } from '@/lib/notebooks/content-values';

export type DemoPerson = 'ida' | 'tam' | 'wren';

export interface DemoVersion {
  author: DemoPerson;
  /** How long before the seeding it was saved. */
  daysAgo: number;
  note: string;
  content: NotebookContent;
}

export interface DemoRevision {
  version: number;
  purpose: string;
  note: string;
  issuedBy: DemoPerson;
  /** Has checked the version, a day before it was issued. */
  checkedBy: DemoPerson;
  remark?: string;
  daysAgo: number;
}

export interface DemoNotebook {
  title: string;
  /** Its own entries in the title block. */
  block: { identificationNumber: string; supplementaryTitle: string; sheet: string };
  /** Issued as A, B … in this order. */
  revisions: DemoRevision[];
  /** Its client link to the latest revision, for the notebook that has one. */
  link?: { label: string; name: string; email: string };
  /** Oldest first. */
  versions: DemoVersion[];
}

const note = (id: string, ...lines: string[]): NotebookCell => ({
  id,
  kind: 'note',
  source: lines.join('\n'),
});
const dimension = (id: string, ...lines: string[]): NotebookCell => ({
  id,
  kind: 'dimension',
  source: lines.join('\n'),
});

const section = (id: string, source: string): NotebookCell => ({ id, kind: 'section', source });

const contentOf = (step: string, cells: NotebookCell[]): NotebookContent =>
  NotebookContent.parse({
    format: 1,
    settings: { ...DEFAULT_NOTEBOOK_SETTINGS, digits: 12, step },
    cells,
  });

const caution = (extra: string): NotebookCell =>
  note(
    'caution',
    `**Before cutting.** Exact figures do not make a structure safe. ${extra} Follow local codes and`,
    'licensed practice, measure the opening on site, and try the first piece before a batch is cut.',
  );

const windowRing = [
  note(
    'head',
    '# Seventeen-light window',
    'Olvane Hall, for the Olvane Hall Trustees. Datum: centre O of the ring; lights are counted from',
    'the top, point 0. Seventeen is one of the divisions straightedge and compass reach exactly.',
  ),
  dimension(
    'ring',
    'R = 1500 mm               # centre of the window to the middle of a light',
    'p = 2 R sin(turn/34)      # pitch: middle of one light to the next',
    'c = cos(turn/17)',
    'p^2 == 2 R^2 (1 - c)',
  ),
  note(
    'foils',
    'The foils are struck from the light points and leave a mullion of 60 mm between them.',
  ),
  dimension('foil', 'f = p/2 - 30 mm           # foil radius'),
];

const windowStones = [
  section('chords-section', 'Chords from point 0'),
  note('chords-head', 'Point 0 to every other light, to check the ring across.'),
  dimension('chords', ...[2, 3, 4, 5, 6, 7, 8].map((k) => `k${k} = chord(R, ${k} turn/17)`)),
  section('stones-section', 'Stones'),
  note(
    'voussoir-head',
    'Voussoirs between radii of 2050 and 2400 mm with a parallel joint of 4 mm: each bed lies half a',
    'joint off its radius, so the joint is not simply taken off the chord.',
  ),
  dimension(
    'voussoir',
    'j = 4 mm                  # joint',
    'S = sin(turn/34)',
    'C = cos(turn/34)',
    'v_in = 2 (S sqrt((2050 mm)^2 - j^2/4) - C j/2)',
    'v_out = 2 (S sqrt((2400 mm)^2 - j^2/4) - C j/2)',
  ),
];

const windowClosing = [
  section('closing-section', 'Closing'),
  note(
    'closing-head',
    'Seventeen pitches each rounded to 551 mm fall short by $17p - 17 \\cdot 551$ mm, so the',
    'ring is set out by running dimensions from point 0, never by stepping one pitch round.',
  ),
  dimension('closing', 'round_trip = 17 p', 'short = round_trip - 17*551 mm', 'short > 4 mm'),
  caution('Stability, fixings and glass belong to the licensed designer.'),
];

const stairPlan = [
  note(
    'head',
    '# Decagonal lantern stair',
    'Olvane Hall. Ten sides, across-corners radius 2400 mm; thirty winders rise 5200 mm. Riser lines',
    'stand every 12°, at ±6° and ±18° from the middle of each side.',
  ),
  dimension(
    'plan',
    'R = 2400 mm',
    'side = R (sqrt(5) - 1)/2',
    'side == 2 R sin(turn/20)',
    'a = R cos(turn/20)        # centre to the middle of a side',
    'a == 600 mm sqrt(10 + 2 sqrt(5))',
  ),
];

const stairTreads = [
  note(
    'treads-head',
    'Tread marks along each string: the middle one is narrower than the two ends.',
  ),
  dimension(
    'treads',
    'middle = 2 a tan(6 deg)',
    'end = (side - middle)/2',
    'end > middle',
    'going = 2*1250 mm sin(6 deg)   # on the walking line',
    'riser = 5200 mm/30',
    'pace = 2 riser + going',
    'rake = sqrt(side^2 + (3 riser)^2)',
  ),
  note('risers-head', 'Thirty risers of 173.3 mm lose exactly one millimetre.'),
  dimension('risers', '5200 mm - 30*173.3 mm == 1 mm'),
  caution('Stair compliance and strength belong to the licensed designer.'),
];

const courtCourses = [
  note(
    'head',
    '# Fifteen-fold paved court',
    'Olvane Hall. Four courses round centre O; fifteen radial joints, reached by straightedge and',
    'compass through the triangle and the pentagon.',
  ),
  dimension(
    'courses',
    'R1 = 1500 mm',
    'R2 = 3000 mm',
    'R3 = 4500 mm',
    'R4 = 6000 mm',
    'a1 = chord(R1, turn/15)',
    'a2 = chord(R2, turn/15)',
    'a3 = chord(R3, turn/15)',
    'a4 = chord(R4, turn/15)',
    'h4 = sagitta(R4, turn/15)   # middle of the outer chord to the arc',
  ),
];

const courtInlay = [
  note(
    'closing-head',
    'Closing of the outer course: fifteen edges of 2494.9 mm fall short of fifteen exact ones.',
  ),
  dimension('closing', '15 a4', '15 a4 - 15*2494.9 mm'),
  note(
    'inlay-head',
    'The inlay at the centre has seven parts, radius 450 mm. Seven cannot be struck exactly with',
    'straightedge and compass. Offered instead: the long side of a right triangle with legs of 250',
    'and 300 mm, 0.017 mm more than the true side. The old rule, half the side of the inscribed',
    'triangle, is 0.784 mm less and its error grows with every step.',
  ),
  dimension(
    'inlay',
    'r7 = 450 mm',
    's7 = chord(r7, turn/7)',
    'q = sqrt((250 mm)^2 + (300 mm)^2)',
    'q == r7 sqrt(61)/9',
    'rule = r7 sqrt(3)/2',
    'q - rule',
  ),
  caution('Lifting and handling are for trained people.'),
];

const WINDOW_STEP = '0.5 mm';
const FINE_STEP = '0.1 mm';

/** The demo's notebooks; the office, the house and the people are invented. */
export const demoNotebooks: DemoNotebook[] = [
  {
    title: 'Decagonal lantern stair',
    block: {
      identificationNumber: '1042',
      supplementaryTitle: 'Olvane Hall, lantern stair',
      sheet: '1',
    },
    revisions: [
      {
        version: 1,
        purpose: 'for comment',
        note: 'Plan only; treads to follow.',
        issuedBy: 'ida',
        checkedBy: 'tam',
        daysAgo: 21,
      },
      {
        version: 2,
        purpose: 'for manufacture',
        note: 'Treads, walking line and risers added.',
        issuedBy: 'ida',
        checkedBy: 'ida',
        daysAgo: 18,
      },
    ],
    versions: [
      {
        author: 'ida',
        daysAgo: 23,
        note: 'Plan from the design drawing',
        content: contentOf(FINE_STEP, stairPlan),
      },
      {
        author: 'tam',
        daysAgo: 20,
        note: 'Treads, walking line and risers',
        content: contentOf(FINE_STEP, [...stairPlan, ...stairTreads]),
      },
    ],
  },
  {
    title: 'Fifteen-fold paved court',
    block: { identificationNumber: '1043', supplementaryTitle: 'Olvane Hall, court', sheet: '1' },
    revisions: [
      {
        version: 1,
        purpose: 'for comment',
        note: 'Courses only.',
        issuedBy: 'ida',
        checkedBy: 'ida',
        daysAgo: 10,
      },
      {
        version: 2,
        purpose: 'for manufacture',
        note: 'Closing check, and a stand-in for the seven-part inlay.',
        issuedBy: 'ida',
        checkedBy: 'tam',
        remark: 'The stand-in keeps within 0.2 mm all the way round.',
        daysAgo: 7,
      },
    ],
    versions: [
      {
        author: 'tam',
        daysAgo: 12,
        note: 'Four courses',
        content: contentOf(FINE_STEP, courtCourses),
      },
      {
        author: 'ida',
        daysAgo: 9,
        note: 'Closing check and the seven-part inlay',
        content: contentOf(FINE_STEP, [...courtCourses, ...courtInlay]),
      },
    ],
  },
  {
    title: 'Seventeen-light window',
    block: {
      identificationNumber: '1041',
      supplementaryTitle: 'Olvane Hall, great window',
      sheet: '1',
    },
    revisions: [
      {
        version: 2,
        purpose: 'for comment',
        note: 'Ring, foils, chords and voussoirs. The closing is still to be checked.',
        issuedBy: 'ida',
        checkedBy: 'ida',
        daysAgo: 3,
      },
      {
        version: 3,
        purpose: 'for manufacture',
        note: 'The closing of the ring is added: set out by running dimensions from point 0.',
        issuedBy: 'ida',
        checkedBy: 'tam',
        remark: 'Chords worked out again from the drawing.',
        daysAgo: 1,
      },
    ],
    link: {
      label: 'Olvane Hall Trustees',
      name: 'The Trustees of Olvane Hall',
      email: 'trustees@olvane-hall.example',
    },
    versions: [
      {
        author: 'ida',
        daysAgo: 6,
        note: 'Ring and foils from the design drawing',
        content: contentOf(WINDOW_STEP, windowRing),
      },
      {
        author: 'tam',
        daysAgo: 4,
        note: 'Chords across the ring, voussoir lengths',
        content: contentOf(WINDOW_STEP, [...windowRing, ...windowStones]),
      },
      {
        author: 'ida',
        daysAgo: 2,
        note: 'Checked; closing added',
        content: contentOf(WINDOW_STEP, [...windowRing, ...windowStones, ...windowClosing]),
      },
    ],
  },
];
