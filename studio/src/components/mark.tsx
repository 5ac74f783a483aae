type Props = { width?: number; height?: number };

/** Rise, plateau, one drop, ledge. */
export function Mark({ width = 30, height = 20 }: Props) {
  return (
    <svg width={width} height={height} viewBox="0 0 30 20" aria-hidden="true">
      <path d="M1 18L7.5 4H18V9.5H29" fill="none" stroke="var(--ink)" strokeWidth="2.4" />
      <path d="M18 9.5H29" stroke="var(--clay)" strokeWidth="2.4" />
    </svg>
  );
}
