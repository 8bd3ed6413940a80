import { screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { FrequencyLine } from '#src/features/frequencyLine/components/FrequencyLine.tsx';
import { aMode, aSummary } from '../modes/solves.ts';
import { renderScreen } from '../render.tsx';

function draw(complete: boolean) {
  renderScreen(
    <FrequencyLine
      summary={{ ...aSummary('consistent', [aMode(1, 47.2)]), complete }}
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
});
