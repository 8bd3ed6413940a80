/** How one word of the strip above the view looks. */
export const BAR_WORD =
  'inline-flex min-h-8 cursor-pointer items-center gap-1 whitespace-nowrap rounded border border-transparent px-2 text-[0.9rem] hover:border-rule disabled:cursor-not-allowed disabled:text-ink-soft aria-pressed:border-ink aria-pressed:font-medium data-[state=open]:border-ink';
