import { DriverError } from "../driver-error";

/** What went wrong on one port, in words. */
export class PortErrors {
  constructor(
    private readonly device: string,
    private readonly path: string,
  ) {}

  /** Name for messages, for example `decade box on sim:box`. */
  get name(): string {
    return `${this.device} on ${this.path}`;
  }

  lost(cause: Error | null): DriverError {
    return new DriverError(
      "port-lost",
      this.name,
      `The port ${this.path} of the ${this.device} is gone.`,
      "Check the adapter and its cable, plug it in again, look at the bench, then resume.",
      { cause },
    );
  }

  noAnswer(line: string, answerMs: number): DriverError {
    const message = `The ${this.name} did not answer “${line}” within ${answerMs} ms.`;
    return new DriverError("no-answer", this.name, message, "Check its power and its cable, then resume.");
  }

  notTaken(line: string, writeMs: number): DriverError {
    const message = `The ${this.name} did not take “${line}” within ${writeMs} ms.`;
    return new DriverError("no-answer", this.name, message, "Check its power and its cable, then resume.");
  }

  garbled(line: string, found: string): DriverError {
    const message = `The ${this.name} answered “${line}” with ${found}, which can't be read.`;
    const cure = "Check its cable and the speed of its port, then resume.";
    return new DriverError("garbled-reply", this.name, message, cure);
  }

  neverQuiet(ms: number): DriverError {
    const message = `The ${this.name} has sent without a pause for ${ms} ms, though nothing was asked.`;
    const cure = "Check the speed of its port and what else is on its line, then resume.";
    return new DriverError("garbled-reply", this.name, message, cure);
  }

  gaveWay(line: string): DriverError {
    const message = `“${line}” was held back from the ${this.name}: an urgent line went first.`;
    return new DriverError("refused", this.name, message, "Look at the bench, then resume.");
  }
}
