/** The ways of looking at the modes; the address holds which one. */
export const LOOKS = [
  { value: 'one', label: 'One mode' },
  { value: 'beside', label: 'Methods beside each other' },
  { value: 'sheet', label: 'Mode sheet' },
  { value: 'table', label: 'Table' },
] as const;

export type Look = (typeof LOOKS)[number]['value'];
