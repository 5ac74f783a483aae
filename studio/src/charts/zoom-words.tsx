type Props = {
  zoomed: boolean;
  /** Below one closer, above it wider. */
  onZoom: (factor: number) => void;
  /** Moves the visible part by a share of itself. */
  onShift: (share: number) => void;
  onWhole: () => void;
};

/** Zoom and pan without a drag: for a finger, and for whoever cannot hold a pointer down. */
export function ZoomWords({ zoomed, onZoom, onShift, onWhole }: Props) {
  return (
    <span className="zoom-words" role="group" aria-label="Visible part of the strips">
      <button type="button" className="lnk" onClick={() => onZoom(0.5)}>
        Closer
      </button>
      {zoomed && (
        <>
          <button type="button" className="lnk" onClick={() => onZoom(2)}>
            Wider
          </button>
          <button type="button" className="lnk" onClick={() => onShift(-0.5)}>
            Earlier
          </button>
          <button type="button" className="lnk" onClick={() => onShift(0.5)}>
            Later
          </button>
          <button type="button" className="lnk" onClick={onWhole}>
            Show the whole session
          </button>
        </>
      )}
    </span>
  );
}
