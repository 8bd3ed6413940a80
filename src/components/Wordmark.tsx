/** A ring on its stand: our own mark. */
export function Mark({ className }: { className?: string }) {
  return (
    <svg
      viewBox="0 0 32 32"
      aria-hidden="true"
      className={className}
      fill="none"
      stroke="currentColor"
      strokeWidth="2.5"
      strokeLinecap="round"
    >
      <circle cx="16" cy="12" r="7.5" />
      <path d="M11 18 7.5 27M21 18l3.5 9M5 27h5M22 27h5" />
      <circle cx="16" cy="12" r="2.5" fill="var(--signal)" stroke="none" />
    </svg>
  );
}

interface WordmarkProps {
  /** On small screens the mark alone, where the place is needed for a project's name. */
  short?: boolean;
}

export function Wordmark({ short = false }: WordmarkProps) {
  return (
    <span className="inline-flex items-center gap-1.5 text-lg leading-none font-semibold tracking-tight">
      <Mark className="size-6" />
      <span className={short ? 'hidden sm:inline' : undefined}>Ringstead</span>
    </span>
  );
}
