import { useEffect, type ReactNode } from 'react';

interface PageHeadingProps {
  /** The document's title is "title – Ringstead". */
  title: string;
  /** Shown in place of the title. */
  children?: ReactNode;
  /** For screens whose view is the heading: there for assistive technology only. */
  hidden?: boolean;
}

/** The h1 of a screen: sets the document's title and takes the focus after navigation (see RouteFocus). */
export function PageHeading({ title, children, hidden = false }: PageHeadingProps) {
  useEffect(() => {
    document.title = `${title} – Ringstead`;
  }, [title]);
  return (
    <h1 tabIndex={-1} className={hidden ? 'sr-only' : undefined}>
      {children ?? title}
    </h1>
  );
}
