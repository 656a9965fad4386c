/* global AudioWorkletProcessor, registerProcessor */
// Runs beside the page, where sound comes in 128 samples at a time: hands them on in hops that a tuner can use.
// Nothing is kept and nothing leaves the page.
const HOP = 1024;

class Frames extends AudioWorkletProcessor {
  constructor() {
    super();
    this.hop = new Float32Array(HOP);
    this.filled = 0;
  }

  process([[channel] = []]) {
    for (const sample of channel ?? []) {
      this.hop[this.filled++] = sample;
      if (this.filled === HOP) {
        this.port.postMessage(this.hop.slice());
        this.filled = 0;
      }
    }
    return true;
  }
}

registerProcessor('frames', Frames);
