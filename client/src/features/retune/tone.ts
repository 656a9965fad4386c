/** Partials of a tone, the fundamental first; a string has many, falling away. */
const PARTIALS = 12;

/** How a tone is made: a plucked one dies away, a steady one stays until it is stopped. */
export type ToneForm = 'plucked' | 'steady';

/**
 * One plucked string as samples between -1 and 1: partials in whole ratios, the higher ones dying sooner.
 * @param frequency hertz
 * @param rate samples per second
 * @param seconds how long until nothing is heard
 */
export function pluckedSamples(frequency: number, rate: number, seconds: number): Float32Array<ArrayBuffer> {
  const samples = new Float32Array(Math.round(rate * seconds));
  const heard = partialsUnder(frequency, rate);
  const loudest = heard.reduce((sum, n) => sum + 1 / n, 0);
  const attack = rate * 0.004;
  for (let at = 0; at < samples.length; at++) {
    const t = at / rate;
    let value = 0;
    for (const n of heard)
      value += (Math.exp((-t * (3 + 1.2 * n)) / seconds) / n) * Math.sin(2 * Math.PI * n * frequency * t);
    const fade = Math.min(1, at / attack, (samples.length - at) / (rate * 0.05));
    samples[at] = (value / loudest) * fade;
  }
  return samples;
}

/** What is above half the rate would come back as another tone. */
function partialsUnder(frequency: number, rate: number): readonly number[] {
  return Array.from({ length: PARTIALS }, (_, index) => index + 1).filter((n) => n * frequency < rate / 2);
}

const PLUCK_SECONDS = 2.6;
/** Loud enough for a quiet corner, and no louder than the room. */
const GAIN = 0.5;

let context: AudioContext | null = null;
let sounding: { stop: () => void } | null = null;

/** Whether this browser can make a tone. */
export const canSound = (): boolean => typeof AudioContext === 'function';

/**
 * Sounds a tone until `stop`, or until it has died away; a tone that sounds already ends first. To be called from a
 * press: browsers let pages sound only then.
 */
export function sound(frequency: number, form: ToneForm): () => void {
  sounding?.stop();
  context ??= new AudioContext();
  void context.resume();
  const gain = new GainNode(context, { gain: GAIN });
  gain.connect(context.destination);
  const source = form === 'plucked' ? plucked(context, frequency) : steady(context, frequency);
  source.connect(gain);
  source.start();
  const now = { stop: () => fadeOut(gain, source) };
  sounding = now;
  return () => {
    if (sounding === now) sounding = null;
    now.stop();
  };
}

function plucked(audio: AudioContext, frequency: number): AudioScheduledSourceNode {
  const samples = pluckedSamples(frequency, audio.sampleRate, PLUCK_SECONDS);
  const buffer = new AudioBuffer({ length: samples.length, sampleRate: audio.sampleRate });
  buffer.copyToChannel(samples, 0);
  return new AudioBufferSourceNode(audio, { buffer });
}

function steady(audio: AudioContext, frequency: number): AudioScheduledSourceNode {
  const imag = Float32Array.from({ length: PARTIALS + 1 }, (_, n) => (n === 0 ? 0 : 1 / n ** 1.5));
  const periodicWave = new PeriodicWave(audio, { real: new Float32Array(PARTIALS + 1), imag });
  return new OscillatorNode(audio, { frequency, type: 'custom', periodicWave });
}

/** A tone cut off short clicks. */
function fadeOut(gain: GainNode, source: AudioScheduledSourceNode): void {
  const { currentTime } = gain.context;
  gain.gain.setTargetAtTime(0, currentTime, 0.02);
  source.stop(currentTime + 0.15);
}
