import { useEffect, useRef, type ReactNode } from 'react';
import { useLocation } from 'react-router-dom';

interface PageHeadingProps {
  /** The document's title is "title – Ringstead". */
  title: string;
  /** Shown in place of the title. */
  children?: ReactNode;
  /** For screens whose view is the heading: there for assistive technology only. */
  hidden?: boolean;
}

/**
 * The h1 of a screen: sets the document's title and takes the focus after navigation, which is also how a
 * screen reader says where one has arrived. The first page of a visit leaves the focus to the browser.
 */
export function PageHeading({ title, children, hidden = false }: PageHeadingProps) {
  const heading = useRef<HTMLHeadingElement>(null);
  const { key, pathname } = useLocation();
  const firstPage = key === 'default';

  useEffect(() => {
    document.title = `${title} – Ringstead`;
  }, [title]);

  useEffect(() => {
    if (!firstPage) heading.current?.focus();
    // Only another path is another page; a search parameter is not.
  }, [pathname, firstPage]);

  return (
    <h1 ref={heading} tabIndex={-1} className={hidden ? 'sr-only' : undefined}>
      {children ?? title}
    </h1>
  );
}
