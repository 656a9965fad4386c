import { useCallback, useEffect, useRef, useState } from 'react';
import { FRAME } from '../tuner/ear';

/** `off` until asked; `withheld` where the browser or the player gives none. */
export type MicrophoneState = 'off' | 'asking' | 'on' | 'withheld';

/** A frame of sound, and when it ended, in milliseconds. */
type OnFrame = (frame: Float32Array, at: number, rate: number) => void;

export interface Microphone {
  readonly state: MicrophoneState;
  readonly start: () => void;
  readonly stop: () => void;
  /** Is told of every frame, until the returned function is called; one at a time. */
  readonly listen: (onFrame: OnFrame) => () => void;
}

/** Browsers give a microphone to secure pages alone: HTTPS, or this very machine. */
export const canListen = (): boolean =>
  typeof AudioWorkletNode === 'function' && 'mediaDevices' in navigator && window.isSecureContext;

/** The microphone of this device, for as long as the page is open. Nothing of it is kept or sent. */
export function useMicrophone(): Microphone {
  const [state, setState] = useState<MicrophoneState>('off');
  const heard = useRef<OnFrame | null>(null);
  const end = useRef<(() => void) | null>(null);
  const stop = useCallback(() => {
    end.current?.();
    end.current = null;
    setState('off');
  }, []);
  const start = useCallback(() => {
    setState('asking');
    open((frame, at, rate) => heard.current?.(frame, at, rate)).then(
      (close) => {
        end.current?.();
        end.current = close;
        setState('on');
      },
      () => setState('withheld'),
    );
  }, []);
  const listen = useCallback((onFrame: OnFrame) => {
    heard.current = onFrame;
    return () => {
      if (heard.current === onFrame) heard.current = null;
    };
  }, []);
  useEffect(() => () => end.current?.(), []);
  return { state, start, stop, listen };
}

/** @throws where the browser or the player gives no microphone */
async function open(onFrame: OnFrame): Promise<() => void> {
  // What makes speech clear makes a string unclear.
  const audio = { echoCancellation: false, noiseSuppression: false, autoGainControl: false };
  const stream = await navigator.mediaDevices.getUserMedia({ audio });
  const context = new AudioContext();
  const close = () => {
    for (const track of stream.getTracks()) track.stop();
    void context.close();
  };
  try {
    await context.audioWorklet.addModule('/frames.js');
    const source = new MediaStreamAudioSourceNode(context, { mediaStream: stream });
    const frames = new AudioWorkletNode(context, 'frames', { numberOfOutputs: 0 });
    const frame = new Float32Array(FRAME);
    let samples = 0;
    frames.port.onmessage = ({ data }: MessageEvent<Float32Array>) => {
      frame.copyWithin(0, data.length);
      frame.set(data, FRAME - data.length);
      samples += data.length;
      onFrame(frame, (samples / context.sampleRate) * 1000, context.sampleRate);
    };
    source.connect(frames);
    await context.resume();
    return close;
  } catch (error) {
    close();
    throw error;
  }
}
