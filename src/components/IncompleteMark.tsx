import { NoticeMark } from './Notice.tsx';

/** Beside every frequency of a solve whose none-missed count does not add up: modes may be missing. */
export function IncompleteMark() {
  return (
    <span
      title="Modes may be missing: the none-missed count does not add up."
      className="inline-flex items-center gap-1 font-sans font-normal whitespace-nowrap text-signal-text"
    >
      <NoticeMark kind="signal" className="size-3.5" />
      incomplete
    </span>
  );
}
