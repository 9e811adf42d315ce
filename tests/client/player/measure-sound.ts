/** What is measured on a rendered sound. Times in seconds, frequencies in hertz. */
export type Measured = {
  /** from the start to the first sample beyond a tenth of the peak */
  readonly onset: number;
  /** from the start to the first sample beyond half of the peak: the steep of the attack is over by then */
  readonly rise: number;
  readonly peak: number;
  /** from the loudest 5 ms until none is within 20 dB of it any more */
  readonly decay: number;
  /** middle of the power spectrum of the first 93 ms, on a logarithmic scale */
  readonly centroid: number;
  /** geometric over arithmetic mean of the power spectrum, 50 Hz to 16 kHz: 1 is white noise */
  readonly flatness: number;
};

function firstBeyond(samples: Float32Array, level: number): number {
  return samples.findIndex((sample) => Math.abs(sample) > level);
}

function decayOf(samples: Float32Array, rate: number): number {
  const width = Math.round(0.005 * rate);
  const power: number[] = [];
  for (let at = 0; at < samples.length; at += width) {
    power.push(samples.subarray(at, at + width).reduce((sum, x) => sum + x * x, 0));
  }
  const loudest = power.indexOf(Math.max(...power));
  const last = power.findLastIndex((p) => p >= power[loudest]! / 100);
  return ((last - loudest + 1) * width) / rate;
}

/** Power of the first `size` samples (a power of two) by the fast Fourier transform, Hann's half window falling to the end. */
function powerSpectrum(samples: Float32Array, size: number): Float64Array {
  const re = Float64Array.from({ length: size }, (_, i) => (samples[i] ?? 0) * (0.5 + 0.5 * Math.cos((Math.PI * i) / size)));
  const im = new Float64Array(size);
  for (let i = 1, j = 0; i < size; i++) {
    let bit = size >> 1;
    for (; j & bit; bit >>= 1) j ^= bit;
    j ^= bit;
    if (i < j) [re[i], re[j]] = [re[j]!, re[i]!];
  }
  for (let half = 1; half < size; half *= 2) {
    for (let k = 0; k < half; k++) {
      const [c, s] = [Math.cos((Math.PI * k) / half), -Math.sin((Math.PI * k) / half)];
      for (let i = k; i < size; i += 2 * half) {
        const [x, y] = [re[i + half]! * c - im[i + half]! * s, re[i + half]! * s + im[i + half]! * c];
        [re[i + half], im[i + half]] = [re[i]! - x, im[i]! - y];
        [re[i], im[i]] = [re[i]! + x, im[i]! + y];
      }
    }
  }
  return re.slice(0, size / 2).map((x, i) => x * x + im[i]! * im[i]!);
}

export function measureSound(samples: Float32Array, rate: number): Measured {
  const peak = samples.reduce((highest, x) => Math.max(highest, Math.abs(x)), 0);
  const power = powerSpectrum(samples, 4096);
  let [sum, logs, weighted, count] = [0, 0, 0, 0];
  power.forEach((p, bin) => {
    const hertz = (bin * rate) / 4096;
    if (hertz < 50 || hertz > 16_000) return;
    sum += p;
    logs += Math.log(p + 1e-12);
    weighted += p * Math.log2(hertz);
    count += 1;
  });
  return {
    onset: firstBeyond(samples, peak / 10) / rate,
    rise: firstBeyond(samples, peak / 2) / rate,
    peak,
    decay: decayOf(samples, rate),
    centroid: 2 ** (weighted / sum),
    flatness: Math.exp(logs / count) / (sum / count),
  };
}
