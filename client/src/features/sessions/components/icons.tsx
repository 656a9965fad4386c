/** Six dots: take hold here. */
export function GripIcon() {
  return (
    <svg width="12" height="18" viewBox="0 0 12 18" fill="currentColor" aria-hidden="true">
      {[3, 9, 15].flatMap((y) => [3, 9].map((x) => <circle key={`${x} ${y}`} cx={x} cy={y} r="1.5" />))}
    </svg>
  );
}

export function DotsIcon() {
  return (
    <svg width="18" height="18" viewBox="0 0 18 18" fill="currentColor" aria-hidden="true">
      {[3, 9, 15].map((x) => (
        <circle key={x} cx={x} cy="9" r="1.7" />
      ))}
    </svg>
  );
}

/** A tack through the card: it keeps its place when an order is suggested. */
export function PinIcon() {
  return (
    <svg
      width="14"
      height="14"
      viewBox="0 0 14 14"
      fill="currentColor"
      stroke="currentColor"
      strokeWidth="1.2"
      strokeLinejoin="round"
      aria-hidden="true"
    >
      <path d="M4 1h6L9.300 5.300 11.500 8h-9L4.700 5.300Z" />
      <path d="M7 8v5.200" fill="none" strokeLinecap="round" />
    </svg>
  );
}
