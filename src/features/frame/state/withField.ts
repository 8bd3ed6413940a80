/** A copy with one field set, or left out where the value is undefined. */
export function withField<T extends object, K extends keyof T>(
  entry: T,
  key: K,
  value: T[K] | undefined,
): T {
  const next = { ...entry };
  if (value === undefined) Reflect.deleteProperty(next, key);
  else next[key] = value;
  return next;
}

/** The record, or undefined where nothing is in it: an optional group of fields with nothing stated is left out. */
export function orNothing<T extends object>(record: T): T | undefined {
  return Object.keys(record).length === 0 ? undefined : record;
}
