/**
 * Reads design tokens where they are needed as plain values: for Plotly and for exported drawings. Each token is read
 * once, so a reader is good until day turns to night.
 */
export function tokenReader(element: Element = document.documentElement): (token: string) => string {
  const style = getComputedStyle(element);
  const known = new Map<string, string>();
  return (token) => {
    const value = known.get(token) ?? style.getPropertyValue(token).trim();
    known.set(token, value);
    return value;
  };
}
