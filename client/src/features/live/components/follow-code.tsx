import { useEffect, useState } from 'react';
import styles from './follow-code.module.css';

/** Modules of quiet around a QR code (ISO/IEC 18004: four). */
const QUIET = 4;

/** The dark modules of a QR code as an SVG path in units of one module, and how many a side has. */
interface Modules {
  readonly of: string;
  readonly side: number;
  readonly path: string;
}

/** The address to follow as a code to scan. Dark on light in both lights, or cameras do not read it. */
export function FollowCode({ url }: { readonly url: string }) {
  const [modules, setModules] = useState<Modules | null>(null);

  useEffect(() => {
    let left = false;
    // Loaded here: the phone's page has no code to draw.
    void import('qrcode').then(({ create }) => {
      const { size, data } = create(url, { errorCorrectionLevel: 'M' }).modules;
      const dark = [...data.keys()].filter((index) => data[index]);
      const path = dark.map((index) => `M${index % size} ${Math.floor(index / size)}h1v1h-1z`).join('');
      if (!left) setModules({ of: url, side: size, path });
    });
    return () => {
      left = true;
    };
  }, [url]);

  const drawn = modules?.of === url ? modules : null;
  const side = (drawn?.side ?? 25) + 2 * QUIET;
  return (
    <svg
      className={styles.code}
      viewBox={`${-QUIET} ${-QUIET} ${side} ${side}`}
      role="img"
      aria-label={`Code to scan: ${url}`}
      shapeRendering="crispEdges"
    >
      {drawn ? <path d={drawn.path} /> : null}
    </svg>
  );
}
