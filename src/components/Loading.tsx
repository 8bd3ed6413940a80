interface LoadingProps {
  /** What is being fetched: "projects". */
  what: string;
  lines?: number;
}

/** Lines where text will stand. */
export function Loading({ what, lines = 4 }: LoadingProps) {
  return (
    <div role="status" className="max-w-xl py-2">
      <span className="sr-only">Loading {what} …</span>
      {Array.from({ length: lines }, (_, line) => (
        <div
          key={line}
          aria-hidden="true"
          className="mb-3 h-3 animate-pulse bg-rule"
          style={{ width: `${[92, 78, 85, 60][line % 4]}%` }}
        />
      ))}
    </div>
  );
}
