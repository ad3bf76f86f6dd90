import { render, screen, within } from '@testing-library/react';
import { describe, expect, it, vi } from 'vitest';
import { ChainTable } from '@/components/divide/chain-table';
import { chainFile, shownChain } from '@/components/divide/chains';
import { CornerTable } from '@/components/divide/corner-table';
import { DivideForm } from '@/components/divide/divide-form';
import { DivisionSheet } from '@/components/divide/division-sheet';
import { PolygonFigure } from '@/components/divide/polygon-figure';
import { sayCount, sayFactors, sayReasons, sayVerdict } from '@/components/divide/wording';
import {
  divide,
  factorise,
  vertices,
  type ChainDocument,
  type DividedCircle,
} from '@/lib/divisions';

// Whole pages of typeset formulas take their time on a busy machine.
vi.setConfig({ testTimeout: 60_000 });

function divided(n: number, radius = '1200 mm'): DividedCircle {
  const outcome = divide(n, radius);
  if (outcome.kind !== 'value') throw new Error(outcome.message);
  return outcome.value;
}

const sheet = (n: number, radius = '1200 mm') =>
  render(<DivisionSheet division={divided(n, radius)} radiusTyped={radius} />);

describe('a division on its sheet', () => {
  it('of 17 is reached, in words and not by colour alone, with sizes, chain and corners', () => {
    const { container } = sheet(17);
    expect(screen.getByText('straightedge and compass')).toBeInTheDocument();
    expect(
      screen.getByText('17 equal parts: straightedge and compass reach this division exactly.'),
    ).toBeInTheDocument();
    expect(screen.getByText('440.998842759769 mm')).toBeInTheDocument();
    const chain = screen.getByLabelText('Quadratics for 17 with their Carlyle circles');
    expect(chain.querySelectorAll('tr')).toHaveLength(1 + 4);
    expect(within(chain).getByText('(−0.5, −1.5)')).toBeInTheDocument();
    expect(screen.getByLabelText('Corners').querySelectorAll('tr')).toHaveLength(1 + 9);
    expect(container.querySelectorAll('math').length).toBeGreaterThan(10);
  });

  it('of 7 says that a trisector would reach it, and shows no steps', () => {
    sheet(7, '450 mm');
    expect(screen.getByText('with an angle trisector')).toBeInTheDocument();
    expect(screen.getByText(/7 is a prime and no Fermat prime/)).toBeInTheDocument();
    expect(screen.queryByText('Steps')).toBeNull();
    expect(screen.queryByText(/Quadratics/)).toBeNull();
    expect(screen.getByText(/^390\.49536520\d{4} mm$/)).toBeInTheDocument();
  });

  it('of 11 says that neither reaches it', () => {
    sheet(11);
    expect(screen.getByText(/nor an angle trisector reach this/)).toBeInTheDocument();
    expect(screen.getByText(/It does not help here/)).toBeInTheDocument();
  });

  it('of 60 lists its steps in order, with the circle of each halving', () => {
    sheet(60);
    const list = screen.getByText(/^15 parts: go 2\/5/).closest('ol');
    expect(list?.children).toHaveLength(5);
    expect(within(list as HTMLElement).getAllByText(/Carlyle circle: centre/)).toHaveLength(1);
  });

  it('of 65537 shows the first rows, the count and what it saves', () => {
    sheet(65537);
    const chain = screen.getByLabelText(/^Quadratics for 65537 with/);
    expect(chain.querySelectorAll('tr')).toHaveLength(1 + 17);
    expect(screen.getByText(/191 below DeTemple’s bound/)).toBeInTheDocument();
    expect(screen.getByText(/as JSON/).closest('a')).toHaveAttribute(
      'href',
      '/divide/chain?prime=65537',
    );
    expect(screen.getByText('Too many points to draw.')).toBeInTheDocument();
  });

  it('of one part and of two has no polygon and no fault', () => {
    for (const n of [1, 2]) {
      const { unmount } = sheet(n);
      expect(screen.queryByText('Sizes of the polygon')).toBeNull();
      unmount();
    }
  });

  it('of a million parts stays small', () => {
    const { container } = sheet(1_000_000);
    expect(container.querySelectorAll('tr')).toHaveLength(1 + 25);
    expect(container.innerHTML.length).toBeLessThan(60_000);
  });
});

describe('the form', () => {
  const fault = (n: string, radius = '1 m') => {
    const outcome = divide(n, radius);
    if (outcome.kind === 'value') throw new Error('a value');
    return outcome;
  };

  it('keeps what was typed and says at the field what to give', () => {
    render(<DivideForm parts="-3" radius="1 m" fault={fault('-3')} />);
    const field = screen.getByLabelText('Parts');
    expect(field).toHaveValue('-3');
    expect(field).toHaveAccessibleDescription(/Give a whole number from 1 to 1 000 000/);
    expect(field).toBeInvalid();
    expect(screen.getByLabelText('Radius')).toBeValid();
  });

  it('tells a bad radius at the radius', () => {
    render(<DivideForm parts="5" radius="wide" fault={fault('5', 'wide')} />);
    expect(screen.getByLabelText('Radius')).toHaveAccessibleDescription(/is not a length/);
    expect(screen.getByLabelText('Parts')).toBeValid();
  });
});

describe('pieces', () => {
  it('a chain table of one quadratic counts in the singular', () => {
    render(<ChainTable {...shownChain(5)} />);
    expect(screen.getByText(/One quadratic is enough\./)).toBeInTheDocument();
  });

  it('a corner table says when it is cut short, and mirrors when it is not', () => {
    const radius = { n: 1n, d: 1n, unit: 'm' } as const;
    const { rerender } = render(
      <CornerTable parts={5} radius={radius} corners={vertices(5, radius, { count: 3 })} />,
    );
    expect(screen.getByText(/Corner 5 − k mirrors corner k/)).toBeInTheDocument();
    rerender(
      <CornerTable parts={900} radius={radius} corners={vertices(900, radius, { count: 3 })} />,
    );
    expect(screen.getByText(/Corners 0 to 2 of 900/)).toBeInTheDocument();
  });

  it('a figure has one point for each part', () => {
    const { container } = render(<PolygonFigure parts={9} />);
    expect(container.querySelectorAll('circle')).toHaveLength(1 + 9);
  });

  it('factors, counts and reasons are written as one says them', () => {
    expect(sayFactors(factorise(360))).toBe('2³ · 3² · 5');
    expect(sayFactors([])).toBe('1');
    expect(sayCount(1_000_000)).toBe('1\u202f000\u202f000');
    expect(sayVerdict(divided(1))).toMatch(/^One part:/);
    expect(sayReasons(divided(9))[0]).toBe('9 = 3²; 9 has the prime 3 more than once.');
    expect(sayReasons(divided(7))[0]).toBe('7 is a prime and no Fermat prime.');
  });
});

describe('the file', () => {
  it('of 257 is handed out checked to 1 000 digits, and made once', async () => {
    const [first, second] = [chainFile(257), chainFile(257)];
    expect(second).toBe(first);
    const file = JSON.parse(await first) as ChainDocument;
    expect(file.check).toEqual({ quadratics: 24, exactProducts: 7, digits: 1000 });
    expect(file.quadratics).toHaveLength(24);
  });
});
