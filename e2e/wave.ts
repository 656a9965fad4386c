/** Samples a second of the files made here. */
export const RATE = 44_100;

/** A mono WAV file of 16-bit samples (Microsoft & IBM, "Multimedia Programming Interface and Data Specifications", 1991). */
export function waveFile(samples: Float32Array): Buffer {
  const data = Buffer.alloc(samples.length * 2);
  samples.forEach((value, at) =>
    data.writeInt16LE(Math.round(Math.max(-1, Math.min(1, value)) * 32_767), at * 2),
  );
  const head = Buffer.alloc(44);
  head.write('RIFF', 0);
  head.writeUInt32LE(36 + data.length, 4);
  head.write('WAVEfmt ', 8);
  head.writeUInt32LE(16, 16);
  head.writeUInt16LE(1, 20);
  head.writeUInt16LE(1, 22);
  head.writeUInt32LE(RATE, 24);
  head.writeUInt32LE(RATE * 2, 28);
  head.writeUInt16LE(2, 32);
  head.writeUInt16LE(16, 34);
  head.write('data', 36);
  head.writeUInt32LE(data.length, 40);
  return Buffer.concat([head, data]);
}

export interface Pluck {
  /** Hertz at its beginning and at its end; the pitch glides between. */
  readonly from: number;
  readonly to?: number;
  readonly seconds: number;
}

/** Plucked strings one after the other, each followed by a pause; 12 partials that die away, the high ones sooner. */
export function plucked(plucks: readonly (Pluck | number)[]): Float32Array {
  const parts = plucks.map((pluck) =>
    typeof pluck === 'number' ? new Float32Array(Math.round(pluck * RATE)) : one(pluck),
  );
  const all = new Float32Array(parts.reduce((sum, { length }) => sum + length, 0));
  let at = 0;
  for (const part of parts) {
    all.set(part, at);
    at += part.length;
  }
  return all;
}

function one({ from, to = from, seconds }: Pluck): Float32Array {
  const count = Math.round(seconds * RATE);
  let phase = 0;
  return Float32Array.from({ length: count }, (_, at) => {
    const t = at / RATE;
    phase += (2 * Math.PI * from * (to / from) ** (at / count)) / RATE;
    let value = 0;
    for (let n = 1; n <= 12; n++) value += (Math.exp(-t * (0.5 + 0.25 * n)) / n) * Math.sin(n * phase);
    const edge = Math.min(1, at / (RATE * 0.004), (count - at) / (RATE * 0.03));
    return value * 0.25 * edge;
  });
}
