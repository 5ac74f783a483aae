const ROWS = 8;

/** The ruled rows of the register before anything stands in them. */
export function RegisterSkeleton() {
  return (
    <div className="studies-skeleton" aria-hidden="true">
      {Array.from({ length: ROWS }, (_, row) => (
        <div key={row} />
      ))}
    </div>
  );
}
