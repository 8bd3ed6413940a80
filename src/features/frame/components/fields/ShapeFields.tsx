import type { SectionShape } from '#shared/schemas/frameDocument.ts';
import type { QuantityKind } from '#shared/units/quantities.ts';
import { QuantityInput } from '#src/components/QuantityInput.tsx';
import type { FieldProblems } from '../../state/problems.ts';
import { withField } from '../../state/withField.ts';
import { above0, not0Below } from './checks.ts';
import { FieldGrid } from './fields.tsx';

interface ShapeFieldsProps {
  readonly shape: SectionShape;
  readonly onChange: (shape: SectionShape) => void;
  readonly problem: FieldProblems;
  readonly disabled: boolean;
}

interface Dimension {
  readonly key: string;
  readonly label: string;
  readonly kind?: QuantityKind;
  /** Zero or less has a meaning: a sharp corner, a product of inertia. */
  readonly allows?: 'zero' | 'any' | 'nothing';
}

const WIDTH = { key: 'width', label: 'Width (along y)' };
const HEIGHT = { key: 'height', label: 'Height (along z)' };
const DIAMETER = { key: 'diameter', label: 'Diameter' };
const WALL = { key: 'wall', label: 'Wall' };
const ROOT = { key: 'radius', label: 'Root radius', allows: 'zero' } as const;
const OPEN: readonly Dimension[] = [
  WIDTH,
  HEIGHT,
  { key: 'web', label: 'Web' },
  { key: 'flange', label: 'Flange' },
  ROOT,
];

const DIMENSIONS: Record<SectionShape['kind'], readonly Dimension[]> = {
  'solid-rectangle': [WIDTH, HEIGHT],
  'solid-round': [DIAMETER],
  'round-tube': [DIAMETER, WALL],
  'rectangular-tube': [
    WIDTH,
    HEIGHT,
    WALL,
    { key: 'radius', label: 'Outer corner radius', allows: 'zero' },
    { key: 'innerRadius', label: 'Inner radius (empty: radius − wall)', allows: 'nothing' },
  ],
  'i-section': OPEN,
  channel: OPEN,
  tee: OPEN,
  angle: [WIDTH, HEIGHT, WALL, ROOT],
  custom: [
    { key: 'A', label: 'A', kind: 'area' },
    { key: 'J', label: 'J', kind: 'secondMoment' },
    { key: 'Iy', label: 'Iy', kind: 'secondMoment' },
    { key: 'Iz', label: 'Iz', kind: 'secondMoment' },
    { key: 'Iyz', label: 'Iyz', kind: 'secondMoment', allows: 'any' },
    { key: 'ky', label: 'κ along y', kind: 'ratio' },
    { key: 'kz', label: 'κ along z', kind: 'ratio' },
  ],
};

/** The dimensions of a section's shape. */
export function ShapeFields({ shape, onChange, problem, disabled }: ShapeFieldsProps) {
  const values = shape as unknown as Record<string, number | undefined>;
  const set = (key: string, value: number | undefined) =>
    onChange(withField(values, key, value) as unknown as SectionShape);
  return (
    <FieldGrid>
      {DIMENSIONS[shape.kind].map(({ key, label, kind = 'sectionLength', allows }) => (
        <QuantityInput
          key={`${shape.kind} ${key}`}
          label={label}
          kind={kind}
          value={values[key] ?? null}
          check={allows === 'any' ? undefined : allows === undefined ? above0 : not0Below}
          onCommit={(value) => set(key, value)}
          onClear={allows === 'nothing' ? () => set(key, undefined) : undefined}
          disabled={disabled}
          error={problem(`shape.${key}`)}
        />
      ))}
    </FieldGrid>
  );
}
