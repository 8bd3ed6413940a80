import { screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeAll, expect, it, vi } from 'vitest';
import { QuantityInput } from '#src/components/QuantityInput.tsx';
import { aPerson, renderScreen } from '../render.tsx';

// mathjs is fetched when a field first appears; the tests are about what follows.
beforeAll(() => import('#src/lib/quantityExpression.ts'), 60_000);

const field = () => screen.getByRole('textbox', { name: 'Height' });

it('shows the value in the person’s units and does not commit by being passed through', async () => {
  const onCommit = vi.fn();
  renderScreen(<QuantityInput label="Height" kind="length" value={1 / 3} onCommit={onCommit} />, {
    person: aPerson({ units: 'in-lbm-lbf' }),
  });
  expect(field()).toHaveValue('13.1234');
  await userEvent.tab();
  expect(field()).toHaveFocus();
  await userEvent.tab();
  expect(onCommit).not.toHaveBeenCalled();
});

it('shows what arithmetic with units means, and commits SI on Enter, once', async () => {
  const onCommit = vi.fn();
  renderScreen(<QuantityInput label="Height" kind="length" value={0.5} onCommit={onCommit} />);
  await userEvent.clear(field());
  await userEvent.type(field(), '2*450 mm + 1/2 in');
  expect(await screen.findByText('= 912.7 mm')).toBeInTheDocument();
  expect(onCommit).not.toHaveBeenCalled();
  await userEvent.keyboard('{Enter}');
  await vi.waitFor(() => expect(onCommit).toHaveBeenCalledExactlyOnceWith(0.9127));
  await userEvent.tab();
  expect(onCommit).toHaveBeenCalledOnce();
});

it('says what is wrong, keeps the text, and commits nothing', async () => {
  const onCommit = vi.fn();
  renderScreen(<QuantityInput label="Height" kind="length" value={0.5} onCommit={onCommit} />);
  await userEvent.clear(field());
  await userEvent.type(field(), '2 kg');
  await userEvent.tab();
  expect(await screen.findByText(/a length is wanted/)).toBeInTheDocument();
  expect(field()).toBeInvalid();
  expect(field()).toHaveAccessibleDescription(/a length is wanted/);
  expect(field()).toHaveValue('2 kg');
  expect(onCommit).not.toHaveBeenCalled();
});

it('refuses by the field’s own check', async () => {
  const onCommit = vi.fn();
  renderScreen(
    <QuantityInput
      label="Height"
      kind="length"
      value={0.5}
      onCommit={onCommit}
      check={(value) => (value > 0 ? null : 'Must be greater than zero.')}
    />,
  );
  await userEvent.clear(field());
  await userEvent.type(field(), '-3{Enter}');
  expect(await screen.findByText('Must be greater than zero.')).toBeInTheDocument();
  expect(onCommit).not.toHaveBeenCalled();
});

it('takes the text back on Escape', async () => {
  const onCommit = vi.fn();
  renderScreen(<QuantityInput label="Height" kind="length" value={0.5} onCommit={onCommit} />);
  await userEvent.type(field(), '77{Escape}');
  expect(field()).toHaveValue('500');
  await userEvent.tab();
  expect(onCommit).not.toHaveBeenCalled();
});

it('may be emptied only where that means something', async () => {
  const onClear = vi.fn();
  const onCommit = vi.fn();
  renderScreen(
    <QuantityInput
      label="Height"
      kind="length"
      value={0.5}
      onCommit={onCommit}
      onClear={onClear}
    />,
  );
  await userEvent.clear(field());
  await userEvent.tab();
  expect(onClear).toHaveBeenCalledOnce();
  expect(onCommit).not.toHaveBeenCalled();
});
