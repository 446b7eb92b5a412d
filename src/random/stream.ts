// Numbered streams of uniform numbers: the one place where chance enters. Stream k of a run is keyed by
// JSON.stringify([seed, tableKey, k]) and by nothing else, so that any block of draws can be made anywhere, in any order.
//
// Generator: Tyche-i (Neves & Araujo 2012), 128 bits of state, 32 bits a step, the inverse of ChaCha's quarter round.
// Its start is the first 128 bits that seedrandom's xor4096 (xorgens: Brent 2007) gives for the key as text: a large generator
// that takes text of any length, here only to spread a key, since a call of it costs three times one of ours. Tyche-i is carried
// here because that package's `tychei` writes c >>> 16 where d >>> 16 belongs: 65,536 states
// then run into one at every step. Its `alea` obeys u[t+3] = 2091639 u[t] + small (mod 1), which ties rare events together.
import xor4096 from 'seedrandom/lib/xor4096.js';

/** The generator's name, as records give it. A change of its numbers is a change of this name. */
export const generatorName = 'tyche-i';

/** Where samplers take chance from. */
export interface UniformSource {
  /** 32 random bits as a signed whole number, -2^31 to 2^31 - 1. */
  word(): number;
  /** The next word as a number in [0, 1): a multiple of 2^-32. */
  uniform(): number;
}

export class Stream implements UniformSource {
  private a: number;
  private b: number;
  private c: number;
  private d: number;

  /** Any four 32-bit words, not all zero; the first of them is the first one handed out. */
  constructor(a: number, b: number, c: number, d: number) {
    this.a = a | 0;
    this.b = b | 0;
    this.c = c | 0;
    this.d = d | 0;
  }

  word(): number {
    let { a, b, c, d } = this;
    // The word is handed out before the step that replaces it, so that nobody waits for the step.
    const word = a;
    b = ((b << 25) | (b >>> 7)) ^ c;
    c = (c - d) | 0;
    d = ((d << 24) | (d >>> 8)) ^ a;
    a = (a - b) | 0;
    b = ((b << 20) | (b >>> 12)) ^ c;
    c = (c - d) | 0;
    d = ((d << 16) | (d >>> 16)) ^ a;
    a = (a - b) | 0;
    this.a = a;
    this.b = b;
    this.c = c;
    this.d = d;
    return word;
  }

  uniform(): number {
    return (this.word() >>> 0) * 2.3283064365386963e-10; // 2^-32
  }

  /** The four words of the state, as signed 32-bit numbers. */
  get state(): readonly [number, number, number, number] {
    return [this.a, this.b, this.c, this.d];
  }
}

/** The stream of one block of draws. Equal arguments give equal streams; a seed is text (`42` is the seed "42"). */
export function blockStream(seed: string, tableKey: string, block: number): Stream {
  const spread = xor4096(JSON.stringify([seed, tableKey, block]));
  return new Stream(spread.int32(), spread.int32(), spread.int32(), spread.int32());
}
