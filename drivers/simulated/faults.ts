/** What becomes of an answer on its way: the bytes sent, and how much later; null for silence. */
export interface Delivery {
  text: string | null;
  lateMs: number;
}

/** A fault tried on each line before the device's own answer is sent. `isSpent` faults are taken out. */
export interface LineFault {
  /** Sees the line and the answer; returns what is delivered instead, or null to let it pass. */
  meet(line: string, answer: string | undefined): Delivery | null;
  readonly isSpent: boolean;
}

function counted(count: number, deliver: (line: string, answer: string | undefined) => Delivery | null): LineFault {
  let left = count;
  return {
    get isSpent() {
      return left <= 0;
    },
    meet(line, answer) {
      const delivery = deliver(line, answer);
      if (delivery) left -= 1;
      return delivery;
    },
  };
}

/** Answers nothing to the next `count` queries. */
export function silent(count: number): LineFault {
  return counted(count, (line) => (line.includes("?") ? { text: null, lateMs: 0 } : null));
}

/** Answers the next `count` queries with broken characters. */
export function garbled(count: number): LineFault {
  return counted(count, (_line, answer) =>
    answer === undefined ? null : { text: `\u0000${answer.slice(0, 2)}#`, lateMs: 0 },
  );
}

/** Answers the next `count` queries `lateMs` too late. */
export function slowBy(lateMs: number, count: number): LineFault {
  return counted(count, (_line, answer) => (answer === undefined ? null : { text: answer, lateMs }));
}

/** Answers the next `count` queries that match with another text: a wrong read-back. */
export function answering(pattern: RegExp, text: string, count: number): LineFault {
  return counted(count, (line) => (pattern.test(line) ? { text, lateMs: 0 } : null));
}

/** Lets `lines` lines through and then pulls the plug. */
export function unpluggedAfter(lines: number, unplug: () => void): LineFault {
  let left = lines;
  return {
    get isSpent() {
      return left <= 0;
    },
    meet() {
      left -= 1;
      if (left > 0) return null;
      unplug();
      return { text: null, lateMs: 0 };
    },
  };
}
