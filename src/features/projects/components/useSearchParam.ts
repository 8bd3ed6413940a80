import { useSearchParams } from 'react-router-dom';

/** The search text, kept in the address so that a link leads to the same list. */
export function useSearchParam(): [string, (search: string) => void] {
  const [params, setParams] = useSearchParams();
  const set = (search: string) =>
    setParams(search === '' ? {} : { search }, { replace: true, preventScrollReset: true });
  return [params.get('search') ?? '', set];
}
