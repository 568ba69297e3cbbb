import { Transform, type TransformCallback } from "node:stream";

/** Stands in for a line that was too long; no device sends it, so it is refused as garbled. */
const OVERLONG_MARK = "\u0000";
const LINE_END = 0x0a;

/** Lets through at most `longest` bytes of a line, so that a device that never ends its line can't fill the memory. */
export class ByteCap extends Transform {
  #length = 0;

  constructor(private readonly longest: number) {
    super();
  }

  override _transform(chunk: Buffer, _encoding: BufferEncoding, done: TransformCallback): void {
    const kept: number[] = [];
    for (const byte of chunk) {
      if (byte === LINE_END) {
        if (this.#length > this.longest) kept.push(OVERLONG_MARK.charCodeAt(0));
        this.#length = 0;
        kept.push(byte);
      } else if (++this.#length <= this.longest) kept.push(byte);
    }
    done(null, Buffer.from(kept));
  }
}
