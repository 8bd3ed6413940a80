import { useSyncExternalStore } from 'react';

/** The theme's tokens a drawing needs, as CSS colours. */
export interface Inks {
  readonly sheet: string;
  readonly ink: string;
  readonly soft: string;
  readonly rule: string;
  readonly pencil: string;
  readonly signal: string;
  readonly focus: string;
}

const PAPER: Inks = {
  sheet: '#fcfbf7',
  ink: '#24282d',
  soft: '#565c63',
  rule: '#d5d2c8',
  pencil: '#757a80',
  signal: '#c23a12',
  focus: '#1d57a8',
};

function readInks(): Inks {
  const style = getComputedStyle(document.documentElement);
  const token = (name: string, otherwise: string) =>
    style.getPropertyValue(name).trim() || otherwise;
  return {
    sheet: token('--sheet', PAPER.sheet),
    ink: token('--ink', PAPER.ink),
    soft: token('--ink-soft', PAPER.soft),
    rule: token('--rule', PAPER.rule),
    pencil: token('--pencil', PAPER.pencil),
    signal: token('--signal', PAPER.signal),
    focus: token('--focus', PAPER.focus),
  };
}

let inks: Inks | null = null;

function watchTheme(changed: () => void): () => void {
  const refresh = () => {
    inks = readInks();
    changed();
  };
  const observer = new MutationObserver(refresh);
  observer.observe(document.documentElement, {
    attributes: true,
    attributeFilter: ['data-theme', 'class'],
  });
  refresh();
  return () => observer.disconnect();
}

/** The inks of the theme on screen, read again when it changes. */
export const useInks = (): Inks => useSyncExternalStore(watchTheme, () => (inks ??= readInks()));
