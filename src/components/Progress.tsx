import { Progress as RadixProgress } from 'radix-ui';

interface ProgressProps {
  label: string;
  /** 0…1 */
  value: number;
}

export function Progress({ label, value }: ProgressProps) {
  const percent = Math.round(Math.min(1, Math.max(0, value)) * 100);
  return (
    <div className="flex items-center gap-3">
      <RadixProgress.Root
        value={percent}
        aria-label={label}
        className="h-2 min-w-24 flex-1 overflow-hidden border border-pencil"
      >
        <RadixProgress.Indicator
          className="h-full bg-ink transition-[width]"
          style={{ width: `${percent}%` }}
        />
      </RadixProgress.Root>
      <span className="num" aria-hidden="true">
        {percent} %
      </span>
    </div>
  );
}
