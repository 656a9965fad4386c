import { Autocorrelator } from 'pitchy';

/** What one frame of sound holds. */
export interface Heard {
  readonly hertz: number;
  /** 0 to 1: how much the frame repeats itself. */
  readonly clarity: number;
}

/** Frequencies between which a string may sound, in hertz. */
export interface Range {
  readonly low: number;
  readonly high: number;
}

/** Samples of a frame: four periods of a double bass's lowest string, a tenth of a second. */
export const FRAME = 4096;
/** Of the highest peak: the first that comes so near is the period (McLeod & Wyvill 2005 take 0.8 to 1). */
const NEAR_HIGHEST = 0.9;
/** A peak in a range is believed before one outside only where it is clearly higher. */
const CLEARLY = 0.03;
/** Less than this is no string. */
const LEAST_CLARITY = 0.8;
/** Root mean square of a frame, full scale 1: below is silence. */
const SILENCE = 0.003;

interface Peak {
  readonly lag: number;
  readonly height: number;
}

/**
 * Finds the pitch of a frame by the normalised square difference of McLeod & Wyvill, "A smarter way to find pitch"
 * (2005), on the autocorrelation of pitchy. Only what lies near a string counts, so that neither an octave of it nor
 * a voice beside is taken for it.
 */
export class Ear {
  private readonly correlator = Autocorrelator.forFloat32Array(FRAME);
  private readonly correlated = new Float32Array(FRAME);

  /** @param rate samples per second */
  constructor(private readonly rate: number) {}

  /**
   * @param frame {@link FRAME} samples
   * @param ranges where strings may sound
   * @returns null where no string is heard
   */
  hear(frame: Float32Array, ranges: readonly Range[]): Heard | null {
    const energy = frame.reduce((sum, value) => sum + value * value, 0);
    if (Math.sqrt(energy / FRAME) < SILENCE) return null;
    const peaks = this.peaks(frame, energy);
    const hertz = ({ lag }: Peak): number => this.rate / lag;
    const isNear = (peak: Peak): boolean =>
      ranges.some(({ low, high }) => hertz(peak) >= low && hertz(peak) <= high);
    const first = firstNearHighest(peaks);
    const near = firstNearHighest(peaks.filter(isNear));
    if (!first || !near || near.height < LEAST_CLARITY) return null;
    // What repeats in a shorter time than any string here is another's note, unless that is but a strong partial.
    if (first.lag < near.lag && !isNear(first) && near.height < first.height + CLEARLY) return null;
    return { hertz: hertz(near), clarity: near.height };
  }

  /** The highest point of every stretch above zero but the first, its place read between samples. */
  private peaks(frame: Float32Array, energy: number): readonly Peak[] {
    this.correlator.autocorrelate(frame, this.correlated);
    const difference = this.correlated;
    // What the frame and the frame a lag later hold together, less what has gone out at both ends.
    let both = 2 * energy;
    difference.forEach((value, lag) => {
      difference[lag] = both > 0 ? (2 * value) / both : 0;
      both -= at(frame, lag) ** 2 + at(frame, FRAME - 1 - lag) ** 2;
    });
    const peaks: Peak[] = [];
    let lag = 1;
    while (lag < FRAME / 2 && at(difference, lag) > 0) lag++;
    let best = -1;
    for (; lag < FRAME / 2; lag++) {
      const value = at(difference, lag);
      if (value > 0) {
        if (best === -1 || value > at(difference, best)) best = lag;
      } else if (best !== -1) {
        peaks.push(between(difference, best));
        best = -1;
      }
    }
    return peaks;
  }
}

const at = (values: Float32Array, index: number): number => values[index] ?? 0;

function firstNearHighest(peaks: readonly Peak[]): Peak | undefined {
  const highest = Math.max(...peaks.map(({ height }) => height));
  return peaks.find(({ height }) => height >= NEAR_HIGHEST * highest);
}

/** The top of the parabola through a point and its neighbours. */
function between(values: Float32Array, lag: number): Peak {
  const [left, middle, right] = [at(values, lag - 1), at(values, lag), at(values, lag + 1)];
  const bend = left - 2 * middle + right;
  const shift = bend === 0 ? 0 : (left - right) / (2 * bend);
  return { lag: lag + shift, height: middle - ((left - right) * shift) / 4 };
}
