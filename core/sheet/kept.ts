/**
 * A function of an immutable object and of things beside it, its last value kept with the object for
 * as long as those things stay the same (compared by identity).
 */
export function kept<K extends object, Beside extends readonly unknown[], V>(
  make: (key: K, ...beside: Beside) => V,
): (key: K, ...beside: Beside) => V {
  const known = new WeakMap<K, { readonly beside: Beside; readonly value: V }>();
  return (key, ...beside) => {
    const ready = known.get(key);
    if (ready && ready.beside.every((x, i) => Object.is(x, beside[i]))) return ready.value;
    const value = make(key, ...beside);
    known.set(key, { beside, value });
    return value;
  };
}
