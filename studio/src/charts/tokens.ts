/** Reads design tokens where they are needed as plain values: for Plotly and for exported drawings. */
export function tokenReader(element: Element = document.documentElement): (token: string) => string {
  const style = getComputedStyle(element);
  return (token) => style.getPropertyValue(token).trim();
}
