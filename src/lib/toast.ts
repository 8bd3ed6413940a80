/** A short message at the foot of the screen. */
export interface ToastMessage {
  readonly id: number;
  readonly text: string;
}

let messages: readonly ToastMessage[] = [];
let lastId = 0;
const watchers = new Set<() => void>();

const change = (next: readonly ToastMessage[]) => {
  messages = next;
  for (const watcher of watchers) watcher();
};

/** Says that something is done. What has failed stands beside its cause instead, where it stays. */
export function toast(text: string): void {
  lastId += 1;
  change([...messages, { id: lastId, text }]);
}

export const dismissToast = (id: number): void =>
  change(messages.filter((message) => message.id !== id));

export const readToasts = (): readonly ToastMessage[] => messages;

export const watchToasts = (watcher: () => void): (() => void) => {
  watchers.add(watcher);
  return () => watchers.delete(watcher);
};
