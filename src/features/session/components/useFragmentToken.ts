import { useEffect, useState } from 'react';

/**
 * The token of a mailed link. It stands in the fragment, which browsers never send to a server, and is taken
 * out of the address and the history as soon as it is read.
 */
export function useFragmentToken(): string | null {
  const [token] = useState(() => {
    const fragment = window.location.hash.slice(1);
    return new URLSearchParams(fragment).get('token') ?? (fragment === '' ? null : fragment);
  });
  useEffect(() => {
    if (window.location.hash !== '') {
      window.history.replaceState(window.history.state, '', window.location.pathname);
    }
  }, []);
  return token;
}
