/** A function of an object, worked out once per object and forgotten with it. */
export function remembered<K extends object, V>(of: (key: K) => V): (key: K) => V {
  const known = new WeakMap<K, V>();
  return (key) => {
    const value = known.get(key) ?? of(key);
    known.set(key, value);
    return value;
  };
}
