import { onScopeDispose } from 'vue'

/** Sound and vibration that reach somebody who is looking at a wattmeter. */
export function useSignals() {
  let audio: AudioContext | null = null

  /** Browsers allow sound only after a touch: call this from the button that begins the work. */
  function allow(): void {
    audio ??= new AudioContext()
    void audio.resume()
  }

  /** Time for a reading: two short notes. */
  function prompt(): void {
    navigator.vibrate?.([120, 80, 120])
    beep(880, 0)
    beep(1175, 0.18)
  }

  /** Stop now: long and low to high, unlike any other signal here. */
  function alarm(): void {
    navigator.vibrate?.([500, 150, 500, 150, 500])
    for (let turn = 0; turn < 3; turn += 1) {
      beep(520, turn * 0.6, 0.28)
      beep(1560, turn * 0.6 + 0.3, 0.28)
    }
  }

  function beep(hertz: number, afterS: number, lengthS = 0.15): void {
    if (!audio || audio.state !== 'running') return
    const tone = audio.createOscillator()
    const volume = audio.createGain()
    tone.frequency.value = hertz
    volume.gain.value = 0.4
    tone.connect(volume).connect(audio.destination)
    tone.start(audio.currentTime + afterS)
    tone.stop(audio.currentTime + afterS + lengthS)
  }

  onScopeDispose(() => void audio?.close())
  return { allow, prompt, alarm }
}
