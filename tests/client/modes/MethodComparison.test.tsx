import { screen, within } from '@testing-library/react';
import { describe, expect, it, vi } from 'vitest';
import { MethodComparison } from '#src/features/modes/components/MethodComparison.tsx';
import { ComparisonNotes } from '#src/features/modes/components/ComparisonNotes.tsx';
import { compareMethod } from '#src/features/modes/state/comparedMethod.ts';
import type { MethodSolve } from '#src/features/modes/api/useMethodSolve.ts';
import { methodName } from '#src/lib/methodName.ts';
import { frameDocument } from '#shared/schemas/frameDocument.ts';
import { renderScreen } from '../render.tsx';
import { aSolve } from './solves.ts';

const consistent = aSolve('consistent', [
  [50, 0],
  [60, 1],
]);
const lumped: MethodSolve = {
  ...{ method: 'lumped', status: 'done', problem: null },
  solved: aSolve('lumped', [
    [49, 0],
    [59, 1],
  ]),
};
/** Its modes stand in the other order: paired by shape, not by number. */
const meshFree: MethodSolve = {
  ...{ method: 'mesh-free', status: 'done', problem: null },
  solved: aSolve('mesh-free', [
    [49.5, 1],
    [55, 0],
  ]),
};

function draw(others: readonly MethodSolve[]) {
  renderScreen(
    <MethodComparison
      consistent={consistent.summary}
      others={others.map((other) => compareMethod(consistent, other))}
      theory="Timoshenko"
      selectedMode={1}
      onChoose={vi.fn()}
    />,
  );
  return (mode: number) =>
    screen
      .getByRole('row', { name: new RegExp(`^Mode ${mode}`) })
      .textContent.replaceAll(/\s+/g, ' ');
}

describe('methods beside each other', () => {
  it('has a column for each method, mesh-free with its theory', () => {
    draw([lumped, meshFree]);
    expect(screen.getAllByRole('columnheader').map((head) => head.textContent)).toEqual([
      ...['Mode', 'Consistent', 'Lumped', 'Mesh-freeTimoshenko'],
    ]);
  });

  it('pairs by shape and says how far each lies from consistent', () => {
    const row = draw([lumped, meshFree]);
    expect(row(1)).toMatch(/50.000 Hz.*49.000 Hz.*−2.00 %.*55.000 Hz.*\+10.00 %.*its mode 2/);
    expect(row(2)).toMatch(/60.000 Hz.*59.000 Hz.*49.500 Hz.*−17.50 %.*its mode 1/);
  });

  it('says why a column is empty and what to do', () => {
    const row = draw([
      { ...lumped, status: 'failed', problem: 'The feet slide.', solved: null },
      { ...meshFree, status: null, solved: null },
    ]);
    expect(row(1)).toContain('50.000 Hz');
    expect(screen.getByText('Lumped: failed: The feet slide.')).toBeVisible();
    expect(screen.getByText(/^Mesh-free: not solved yet .* press Solve at Frame\.$/)).toBeVisible();
  });

  it('marks the method whose solve is incomplete, and no other', () => {
    draw([lumped, { ...meshFree, solved: aSolve('mesh-free', [[50, 0]], { complete: false }) }]);
    const heads = screen.getAllByRole('columnheader');
    expect(heads.map((head) => within(head).queryByText('incomplete') !== null)).toEqual([
      ...[false, false, false, true],
    ]);
    expect(screen.getByRole('row', { name: /^Mode 2/ })).toHaveTextContent('no such shape');
  });
});

describe('words about the methods', () => {
  const line = { start: 'a', end: 'b', material: 'steel', section: 'tube' };
  const frame = (...kinds: { kind: 'beam' | 'bar'; theory?: 'bernoulli' }[]) =>
    frameDocument.parse({
      name: 'Frame',
      members: kinds.map((one, i) => ({ id: `m${i}`, ...line, ...one })),
    });

  it('names the theory beside mesh-free, of beams only', () => {
    expect(methodName('mesh-free', frame({ kind: 'beam' }, { kind: 'bar' }))).toBe(
      'mesh-free, Timoshenko',
    );
    expect(
      methodName('mesh-free', frame({ kind: 'beam', theory: 'bernoulli' }, { kind: 'beam' })),
    ).toBe('mesh-free, Timoshenko and Bernoulli-Euler');
    expect(methodName('lumped', frame())).toBe('lumped mass');
  });

  it('says of bars and of lumped Timoshenko members where they do not converge to it', () => {
    renderScreen(
      <ComparisonNotes document={frame({ kind: 'bar' }, { kind: 'beam', theory: 'bernoulli' })} />,
    );
    const said = screen.getByText(/free of mesh error, not of modelling error/);
    expect(said).toHaveTextContent('Bars never divide');
    expect(said).not.toHaveTextContent('rotary inertia');
  });

  it('says of lumped Timoshenko members that they tend to another limit', () => {
    renderScreen(<ComparisonNotes document={frame({ kind: 'beam' })} />);
    const said = screen.getByText(/free of mesh error/);
    expect(said).toHaveTextContent('no rotary inertia of bending');
    expect(said).not.toHaveTextContent('Bars never divide');
  });
});
