import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import type { Head, PegPlace } from '@pegwell/shared/music/peg-places';
import { buttonsOf, HEIGHT, NUT, outlineOf, stringX, WIDTH, type Button } from './head-layout';

interface HeadPictureProps {
  readonly kind: InstrumentKind;
  readonly head: Head;
  /** The course whose peg is lit; null where none is. */
  readonly lit: number | null;
  /** Which way it turns. */
  readonly direction: 'up' | 'down';
}

/**
 * The instrument's own pegbox or peghead from the front, the peg to turn lit. Drawn from places, sides and rows; a
 * left-handed one is the same picture of mirrored places. The words beside say the same: voices pass over it.
 */
export function HeadPicture({ kind, head, lit, direction }: HeadPictureProps) {
  // What is lit is drawn last, over the strings of the others.
  const places = [...head.places].sort(
    (a, b) => Number(a.courseIndex === lit) - Number(b.courseIndex === lit),
  );
  return (
    <svg
      viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
      width={WIDTH}
      height={HEIGHT}
      aria-hidden="true"
      strokeLinejoin="round"
    >
      <path d={outlineOf(head)} fill="var(--raised)" stroke="var(--ink-2)" strokeWidth="2" />
      {head.shape === 'scroll' ? <Scroll /> : <Nut head={head} />}
      {places.map((place) => (
        <Peg key={place.courseIndex} {...{ kind, head, place, direction }} lit={place.courseIndex === lit} />
      ))}
    </svg>
  );
}

function Scroll() {
  return (
    <g fill="none" stroke="var(--ink-2)" strokeWidth="2">
      <circle cx={WIDTH / 2} cy="36" r="26" fill="var(--raised)" />
      <path d={`M${WIDTH / 2} 50a14 14 0 1 1 13-15a9 9 0 1 1-13-8`} />
    </g>
  );
}

function Nut({ head }: { readonly head: Head }) {
  const y = NUT - (head.places.some(({ side }) => side === 'neck') ? 60 : 0);
  return (
    <path d={`M${WIDTH / 2 - 37} ${y}h74`} stroke="var(--ink-2)" strokeWidth="5" strokeLinecap="round" />
  );
}

interface PegProps extends Omit<HeadPictureProps, 'lit'> {
  readonly place: PegPlace;
  readonly lit: boolean;
}

function Peg({ kind, head, place, lit, direction }: PegProps) {
  const course = kind.courses[place.courseIndex];
  if (!course) return null;
  const buttons = buttonsOf(head, place, course.pegs);
  const x = stringX(head, place.courseIndex);
  const [first] = buttons;
  if (!first) return null;
  return (
    <g data-lit={lit || undefined}>
      {buttons.map((button) => (
        <g key={button.y}>
          {place.side === 'neck' ? null : (
            <path
              d={`M${x} ${HEIGHT}V${button.y}`}
              fill="none"
              stroke={lit ? 'var(--rosin)' : 'var(--ink-2)'}
              strokeWidth={lit ? 3.2 : 1.4}
            />
          )}
          <Shaft head={head} button={button} lit={lit} />
        </g>
      ))}
      {buttons.map((button) => (
        <text
          key={button.y}
          x={button.x}
          y={button.y + 9}
          textAnchor="middle"
          fontSize={buttons.length > 1 ? 19 : 25}
          fontWeight="900"
          fill={lit ? 'var(--on-rosin)' : 'var(--ink-2)'}
        >
          {course.name}
        </text>
      ))}
      {lit ? <Way head={head} button={first} direction={direction} /> : null}
    </g>
  );
}

/** The peg from its string out to its head: a tapered one through the cheek, or a post and a machine's button. */
function Shaft({
  head,
  button,
  lit,
}: {
  readonly head: Head;
  readonly button: Button;
  readonly lit: boolean;
}) {
  const { x, y, out, half, post } = button;
  const [fill, stroke, width] = lit
    ? ['var(--rosin)', 'var(--rosin-ink)', 2.4]
    : ['var(--raised)', 'var(--ink-2)', 1.6];
  const collar = x - out * (half + 4);
  return (
    <g fill={fill} stroke={stroke} strokeWidth={width}>
      {head.shape === 'scroll' ? (
        <path d={`M${post} ${y - 5}L${collar - out * 4} ${y - 8}v16L${post} ${y + 5}Z`} />
      ) : (
        <>
          <path d={`M${post} ${y}H${collar}`} />
          <circle cx={post} cy={y} r="6" />
        </>
      )}
      <path d={`M${collar} ${y - half / 2}v${half}`} strokeWidth="4" strokeLinecap="round" />
      <ellipse cx={x} cy={y} rx={half} ry={button.ry} />
    </g>
  );
}

/** An arrow along the peg's head where the build fixes which way it turns. */
function Way({
  head,
  button,
  direction,
}: { readonly head: Head; readonly button: Button } & Pick<HeadPictureProps, 'direction'>) {
  const x = button.x + button.out * (button.half + 16);
  const up = direction === 'up';
  const [tail, tip] = up ? [button.y + 28, button.y - 28] : [button.y - 28, button.y + 28];
  const barb = up ? 13 : -13;
  return (
    <>
      {head.friction ? (
        <path
          d={`M${x} ${tail}V${tip}m-11 ${barb}l11 ${-barb}l11 ${barb}`}
          fill="none"
          stroke="var(--rosin-ink)"
          strokeWidth="4"
          strokeLinecap="round"
        />
      ) : null}
      <text
        x={head.friction ? (button.out < 0 ? 4 : WIDTH - 4) : button.x}
        y={button.y + button.ry + 20}
        textAnchor={head.friction ? (button.out < 0 ? 'start' : 'end') : 'middle'}
        fontSize="14"
        fontWeight="700"
        fill="var(--rosin-ink)"
      >
        {head.friction ? (up ? 'to the scroll' : 'to the bridge') : up ? 'sharper' : 'flatter'}
      </text>
    </>
  );
}
