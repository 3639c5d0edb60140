'use client';

import { useEffect, useRef, useState, useSyncExternalStore } from 'react';

/** How often a frame is looked at; a phone stays cool and a code held still is seen at once. */
const LOOK_MS = 160;
const WIDTH = 640;

type Decode = typeof import('qr/decode.js').default;

/** Reads the QR code of a picture; null when there is none. */
function read(decode: Decode, source: CanvasImageSource, width: number, height: number): string | null {
  const canvas = document.createElement('canvas');
  const scale = Math.min(1, WIDTH / width);
  canvas.width = Math.round(width * scale);
  canvas.height = Math.round(height * scale);
  const context = canvas.getContext('2d', { willReadFrequently: true });
  if (!context) return null;
  context.drawImage(source, 0, 0, canvas.width, canvas.height);
  try {
    return decode(context.getImageData(0, 0, canvas.width, canvas.height));
  } catch {
    return null;
  }
}

const never = () => () => {};
const hasCamera = () => 'mediaDevices' in navigator;

interface Props {
  /** Called for every code that is seen, again and again while it is held there. */
  onCode(text: string): void;
  words: { start: string; stop: string; none: string; picture: string };
}

/** The camera as a scanner where the browser gives it (https), else a picture taken by the camera app. */
export function Scanner({ onCode, words }: Props) {
  const video = useRef<HTMLVideoElement>(null);
  const [isOn, setOn] = useState(false);
  const [hasFailed, setFailed] = useState(false);
  const canScan = useSyncExternalStore(never, hasCamera, () => false) && !hasFailed;
  const seen = useRef(onCode);
  useEffect(() => {
    seen.current = onCode;
  });
  useEffect(() => {
    if (!isOn) return;
    let stream: MediaStream | null = null;
    let timer: ReturnType<typeof setInterval> | undefined;
    let isGone = false;
    const start = async () => {
      const { default: decode } = await import('qr/decode.js');
      stream = await navigator.mediaDevices.getUserMedia({ video: { facingMode: 'environment' } });
      if (isGone || !video.current) return stop();
      video.current.srcObject = stream;
      await video.current.play();
      timer = setInterval(() => {
        const picture = video.current;
        if (!picture || picture.videoWidth === 0) return;
        const text = read(decode, picture, picture.videoWidth, picture.videoHeight);
        if (text) seen.current(text);
      }, LOOK_MS);
    };
    const stop = () => {
      clearInterval(timer);
      stream?.getTracks().forEach((track) => track.stop());
    };
    start().catch(() => {
      setFailed(true);
      setOn(false);
    });
    return () => {
      isGone = true;
      stop();
    };
  }, [isOn]);

  const fromPicture = async (file: File | undefined) => {
    if (!file) return;
    const { default: decode } = await import('qr/decode.js');
    const picture = await createImageBitmap(file);
    const text = read(decode, picture, picture.width, picture.height);
    if (text) seen.current(text);
    else setFailed(true);
  };

  return (
    <div className="stack tight">
      {isOn && <video ref={video} muted playsInline className="finder" />}
      <div className="row wrap">
        {canScan && <button type="button" className="btn btn-main" onClick={() => setOn(!isOn)}>{isOn ? words.stop : words.start}</button>}
        <label className="btn">
          {words.picture}
          <input type="file" accept="image/*" capture="environment" className="visually-hidden" onChange={(event) => void fromPicture(event.target.files?.[0])} />
        </label>
      </div>
      {hasFailed && <p className="hint" role="status">{words.none}</p>}
    </div>
  );
}
