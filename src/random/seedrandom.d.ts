// The calls we use of one file of seedrandom, which its published types leave out.
declare module 'seedrandom/lib/xor4096.js' {
  interface Generator {
    /** The next 32 bits as a signed number. */
    int32(): number;
  }
  /** A generator started from text. */
  export default function xor4096(seed: string): Generator;
}
