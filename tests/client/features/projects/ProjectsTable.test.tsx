import { screen, within } from '@testing-library/react';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import type { ProjectSummary } from '#shared/schemas/project.ts';
import { ProjectsTable } from '#src/features/projects/components/ProjectsTable.tsx';
import { renderScreen } from '../../render.tsx';

const aProject = (part: Partial<ProjectSummary>): ProjectSummary => ({
  id: '3f0e8c6a-0c43-4c8f-9a52-0d5ad2c1a009',
  ...{ name: 'Stand', machine: 'Pump', updatedAt: '2026-12-01T08:00:00.000Z' },
  ...{ latestRevision: null, approvedRevision: null, waitsFor: 'designer', waitsForMe: true },
  ...{ firstFrequencyHz: 47.21, firstFrequencyComplete: true },
  ...part,
});

/** The only row under the head. */
function row(part: Partial<ProjectSummary>): HTMLElement {
  renderScreen(<ProjectsTable projects={[aProject(part)]} />);
  return screen.getByRole('row', { name: /Stand/ });
}

beforeEach(() => {
  vi.stubGlobal('matchMedia', () => ({
    ...{ matches: false, addEventListener: vi.fn(), removeEventListener: vi.fn() },
  }));
});

describe('first mode in the list of projects', () => {
  it('stands alone where its solves are complete', () => {
    expect(row({})).toHaveTextContent('47.21 Hz');
    expect(screen.queryByText('incomplete')).toBeNull();
  });

  it('carries the word and a mark where a solve is incomplete', () => {
    const shown = within(row({ firstFrequencyComplete: false })).getByText('incomplete');
    expect(shown.closest('td')).toHaveTextContent('47.21 Hz');
    expect(shown.querySelector('svg')).not.toBeNull();
  });

  it('says that an incomplete solve found none', () => {
    const none = row({ firstFrequencyHz: null, firstFrequencyComplete: false });
    expect(none).toHaveTextContent(/none found ?incomplete/);
    expect(none).not.toHaveTextContent('not solved');
  });

  it('says that none was made', () => {
    expect(row({ firstFrequencyHz: null, firstFrequencyComplete: null })).toHaveTextContent(
      'not solved',
    );
  });
});
