import { screen } from '@testing-library/react';
import { describe, expect, it, vi } from 'vitest';
import { frameDocument } from '#shared/schemas/frameDocument.ts';
import type { HandCheck, SolveSummary } from '#shared/schemas/solveResult.ts';
import { HandCheckTable } from '#src/features/modes/components/HandCheckTable.tsx';
import { ModeDetails } from '#src/features/modes/components/ModeDetails.tsx';
import { ModeTable } from '#src/features/modes/components/ModeTable.tsx';
import { formatDeflection } from '#src/features/modes/state/formatMode.ts';
import { aPerson, renderScreen } from '../render.tsx';
import { aCheck, aMode, aSummary } from './solves.ts';

/** Modes at 47.2 and 54.2 Hz. */
const summaryWith = (...axes: HandCheck[]): SolveSummary => ({
  ...aSummary('consistent', [aMode(1, 47.2), aMode(2, 54.2)]),
  handChecks: { none: null, axes },
});

function details(summary: SolveSummary, mode: number, units: 'mm-kg-N' | 'in-lbm-lbf' = 'mm-kg-N') {
  renderScreen(
    <ModeDetails
      mode={summary.modes[mode - 1] ?? aMode(mode, NaN)}
      summary={summary}
      document={frameDocument.parse({ name: 'Frame' })}
    />,
    { person: aPerson({ units }) },
  );
  return screen.getByRole('region', { name: `Mode ${mode}` });
}

describe('hand check beside its mode', () => {
  it('shows each value, what it is worth and how far it lies from the mode', () => {
    const shown = details(summaryWith(aCheck()), 1);
    expect(shown).toHaveTextContent('Hand check, 1 g along X');
    expect(shown).toHaveTextContent(/Rayleigh ?from above ?47\.9 Hz ?\+1\.48 %/);
    expect(shown).toHaveTextContent(/g\/δ ?largest deflection, 50\.8 µm.*44\.2 Hz ?−6\.36 %/);
    expect(shown).toHaveTextContent(/nodes only ?26\.6 µm ?61\.1 Hz/);
    expect(shown).toHaveTextContent(/Dunkerley ?from below if all moved along X alone ?40\.1 Hz/);
    expect(shown).not.toHaveTextContent('holds only');
    expect(shown).not.toHaveTextContent(/outside its bounds/i);
  });

  it('stands beside no other mode, and not in results stored without it', () => {
    expect(details(summaryWith(aCheck()), 2)).not.toHaveTextContent('Hand check');
    expect(details(aSummary('consistent', [aMode(1, 47.2)]), 1)).not.toHaveTextContent('Hand');
  });

  it('says where the mode holds less than half of what moves along the axis', () => {
    expect(details(summaryWith(aCheck({ share: 0.31 })), 1)).toHaveTextContent(
      'This mode holds only 31 % of the mass that moves along X',
    );
  });

  it.each([
    { what: 'the lowest mode over Rayleigh by a twentieth', mode: 1, rayleigh: 44, said: true },
    { what: 'the lowest mode within it', mode: 1, rayleigh: 45.5, said: false },
    { what: 'the lowest mode by the axis of a higher one', mode: 2, rayleigh: 44, said: true },
    { what: 'a higher mode, which Rayleigh does not bound', mode: 2, rayleigh: 48, said: false },
  ])('judges $what', ({ mode, rayleigh, said }) => {
    const shown = details(summaryWith(aCheck({ mode, rayleigh })), mode);
    expect(/outside its bounds/i.test(shown.textContent)).toBe(said);
  });

  it.each([55, null])(
    'judges nothing by Dunkerley %s: coupled motions lie below it',
    (dunkerley) => {
      const shown = details(summaryWith(aCheck({ mode: 2, dunkerley })), 2);
      expect(shown).not.toHaveTextContent(/outside its bounds/i);
      expect(shown.textContent.includes('too many masses')).toBe(dunkerley === null);
    },
  );

  it('shows deflections in the units of the person', () => {
    expect(details(summaryWith(aCheck()), 1, 'in-lbm-lbf')).toHaveTextContent('0.002 in');
    expect(formatDeflection(1.234e-3, 'mm-kg-N')).toBe('1.23 mm');
    expect(formatDeflection(5.08e-5, 'm-kg-N')).toBe('50.8 µm');
  });
});

describe('hand checks in the table', () => {
  it('stand in the row of the mode they speak to', () => {
    renderScreen(<ModeTable summary={summaryWith(aCheck())} selectedMode={1} onChoose={vi.fn()} />);
    expect(screen.getByRole('row', { name: /^Mode 1/ })).toHaveTextContent(
      'hand check along X: Rayleigh 47.9 Hz',
    );
    expect(screen.getByRole('row', { name: /^Mode 2/ })).not.toHaveTextContent('hand check');
  });

  it('are summed up by axis, one that no mode moves along too', () => {
    const { modes } = summaryWith();
    const axes = [aCheck(), aCheck({ axis: 'Z', mode: null, share: 0 })];
    renderScreen(<HandCheckTable checks={{ none: null, axes }} modes={modes} />);
    expect(screen.getByRole('row', { name: /^X/ })).toHaveTextContent(
      /Mode 1, 47\.200 Hz.*80 %.*40\.1 Hz.*44\.2 Hz.*50\.8 µm.*61\.1 Hz.*26\.6 µm.*47\.9 Hz/,
    );
    expect(screen.getByRole('row', { name: /^Z/ })).toHaveTextContent(
      'no mode found moves along Z',
    );
  });

  it('give the reason where there is none', () => {
    renderScreen(<HandCheckTable checks={{ none: 'It floats.', axes: [] }} modes={[]} />);
    expect(screen.getByText('Hand checks: It floats.')).toBeVisible();
    expect(screen.queryByRole('table')).toBeNull();
  });
});
