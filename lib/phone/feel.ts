import { SOUND_KEY } from './settings';

/** A short buzz where the phone has one; not for those who asked for less motion. */
export function feel(): void {
  if (typeof navigator === 'undefined' || !('vibrate' in navigator)) return;
  if (matchMedia('(prefers-reduced-motion: reduce)').matches) return;
  navigator.vibrate(12);
}

/** A soft tone at the end of a rest, only if the panelist switched it on. */
export function chime(): void {
  try {
    if (localStorage.getItem(SOUND_KEY) !== 'on') return;
    const context = new AudioContext();
    const tone = context.createOscillator();
    const volume = context.createGain();
    tone.frequency.value = 523;
    volume.gain.setValueAtTime(0.06, context.currentTime);
    volume.gain.exponentialRampToValueAtTime(0.001, context.currentTime + 0.6);
    tone.connect(volume).connect(context.destination);
    tone.start();
    tone.stop(context.currentTime + 0.6);
    tone.onended = () => void context.close();
  } catch {
    // No sound is no trouble: the button says the same.
  }
}
