interface TurnMarkProps {
  readonly up: boolean;
  /** Side of the square it stands in, in px. */
  readonly size: number;
}

/** ▲ or ▼, drawn: the shipped typeface has neither. Takes the colour of the text around it. */
export function TurnMark({ up, size }: TurnMarkProps) {
  return (
    <svg width={size} height={size} viewBox="0 0 10 10" fill="currentColor" aria-hidden="true">
      <path d={up ? 'M5 .8 9.6 9H.4Z' : 'M5 9.2.4 1h9.2Z'} />
    </svg>
  );
}
