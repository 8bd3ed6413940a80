import { screen, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { FrequencyLine } from '#src/features/frequencyLine/components/FrequencyLine.tsx';
import type { Preview } from '#src/lib/preview.ts';
import { aStand } from '#tests/builders/aFrame.ts';
import { accepted } from '#tests/builders/aLine.ts';
import { aMode, aSummary } from '../modes/solves.ts';
import { renderScreen } from '../render.tsx';

function draw(complete: boolean, preview: Preview | null = null) {
  renderScreen(
    <FrequencyLine
      summary={{ ...aSummary('consistent', [aMode(1, 47.2)]), complete }}
      preview={preview}
      caption="Draft"
      remarks={[]}
      selectedMode={null}
      hrefFor={() => '/'}
    />,
  );
  return screen.getByRole('region', { name: 'Frequency line' });
}

describe('frequency line', () => {
  it('says that modes may be missing, with a mark', () => {
    const line = draw(false);
    expect(line).toHaveTextContent('incomplete: modes may be missing');
    expect(screen.getByText('incomplete').querySelector('svg')).not.toBeNull();
  });

  it('says nothing of it where the solve is complete', () => {
    expect(draw(true)).not.toHaveTextContent('incomplete');
  });

  it('shows a preview in the place of the stored modes, which nobody can open then', () => {
    const frame = accepted(aStand());
    const preview = { projectId: 'p', document: frame, stateId: null, refusal: null };
    const line = draw(true, { ...preview, frequenciesHz: [0, 44.74, 49.97] });
    expect(screen.getByRole('status')).toHaveTextContent(
      'Preview: natural frequencies 44.7 Hz, 50.0 Hz',
    );
    expect(within(line).queryByRole('link')).toBeNull();
  });
});
