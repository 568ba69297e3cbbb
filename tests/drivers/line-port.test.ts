import { afterEach, beforeEach, describe, expect, it } from "vitest";
import type { DriverError } from "@/drivers/driver-error";
import { garbled, silent, slowBy } from "@/drivers/simulated/faults";
import type { SimulatedDevice } from "@/drivers/simulated/scpi-device";
import { SimulatedBinding, SimulatedSocket, type SimulatedPort } from "@/drivers/simulated/simulated-binding";
import { LinePort } from "@/drivers/transport/line-port";
import type { PortSettings } from "@/drivers/transport/port-binding";
import { VirtualClock } from "@/lib/engine/virtual-clock";
import { seededRandom } from "../support/seeded-random";

const PATH = "sim:echo";

let clock: VirtualClock;
let socket: SimulatedSocket;
let port: LinePort;
/** Lines that the device has received. */
let received: string[];

/** Answers each question with its own words, so that an answer to another question shows. */
class Echo implements SimulatedDevice {
  readonly role = "meter";
  #eventEnable = "0";

  receiveLine(line: string): string | undefined {
    if (line.startsWith("*ESE ")) this.#eventEnable = line.slice(5);
    if (line === "*ESE?") return this.#eventEnable;
    if (line === "*IDN?") return "Lindqvist,VM-6,M-1,1.0";
    return line.endsWith("?") ? `re ${line}` : undefined;
  }
}

beforeEach(async () => {
  clock = new VirtualClock({ startMs: 0 });
  received = [];
  socket = new SimulatedSocket(new Echo(), (_device, line) => received.push(line));
  const binding = new SimulatedBinding(new Map([[PATH, socket]]), clock);
  port = new LinePort({ device: "meter", path: PATH, baudRate: 9600, clock, binding });
  await port.open();
});

afterEach(() => port.close());

describe("a line port", () => {
  it("gets in step before its first question, after the line has been quiet", async () => {
    expect(await port.ask("A?")).toBe("re A?");
    expect(received).toEqual(["*CLS", "*ESE 101", "*ESE?", "A?"]);
    expect(clock.monotonicMs()).toBeGreaterThan(50);
  });

  it("asks one question at a time, in the order in which they came", async () => {
    const answers = await Promise.all(["A?", "B?", "C?"].map((line) => port.ask(line)));
    expect(answers).toEqual(["re A?", "re B?", "re C?"]);
    expect(received.slice(3)).toEqual(["A?", "B?", "C?"]);
  });

  it("takes lines that end in CR LF as well", async () => {
    await port.ask("A?");
    socket.faults.push({ isSpent: false, meet: (_line, answer) => ({ text: `${answer}\r`, lateMs: 0 }) });
    expect(await port.ask("B?")).toBe("re B?");
  });

  it("says after silence which question, of which device, was not answered in what time", async () => {
    await port.ask("A?");
    socket.faults.push(silent(1));
    const beganMs = clock.monotonicMs();
    await expect(port.ask("B?")).rejects.toMatchObject({
      name: "DriverError",
      code: "no-answer",
      device: "meter on sim:echo",
      message: "The meter on sim:echo did not answer “B?” within 1000 ms.",
    });
    expect(clock.monotonicMs() - beganMs).toBe(1000);
    expect(await port.ask("C?")).toBe("re C?");
  });

  it("never takes a late answer for the next question's", async () => {
    await port.ask("A?");
    const random = seededRandom(20);
    for (let trial = 0; trial < 100; trial += 1) {
      socket.faults.push(slowBy(Math.floor(900 + random() * 1800), 1));
      const outcomes = await Promise.allSettled([port.ask(`LATE${trial}?`), port.ask(`NEXT${trial}?`)]);
      for (const [index, line] of [`LATE${trial}?`, `NEXT${trial}?`].entries()) {
        const outcome = outcomes[index]!;
        if (outcome.status === "fulfilled") expect(outcome.value).toBe(`re ${line}`);
        else expect((outcome.reason as DriverError).code).toBe("no-answer");
      }
    }
    expect(await port.ask("Z?")).toBe("re Z?");
  });

  it("gets in step anew after every time-out, with another number each time", async () => {
    for (let trial = 0; trial < 200; trial += 1) {
      socket.faults.push(silent(1));
      await expect(port.ask("A?")).rejects.toMatchObject({ code: "no-answer" });
      expect(await port.ask("B?")).toBe("re B?");
    }
    const tokens = received.filter((line) => line.startsWith("*ESE ")).map((line) => Number(line.slice(5)));
    expect(tokens.every((token, index) => token !== tokens[index - 1])).toBe(true);
    expect([Math.min(...tokens), Math.max(...tokens)]).toEqual([100, 255]);
  });

  it("passes over torn remains of older answers on its way back into step", async () => {
    socket.faults.push({
      isSpent: false,
      meet: (line, answer) => (line === "*ESE?" ? { text: `5E\u0000\n.2E+09\n${answer}`, lateMs: 0 } : null),
    });
    expect(await port.ask("A?")).toBe("re A?");
  });

  it("gives up a device that answers other questions for ever", async () => {
    socket.faults.push({
      isSpent: false,
      meet: (line) => (line === "*ESE?" ? { text: "1\n".repeat(20), lateMs: 0 } : null),
    });
    await expect(port.ask("A?")).rejects.toMatchObject({ code: "garbled-reply", message: /other questions/u });
  });

  it("does not take a late identity for the answer to the next question", async () => {
    await port.ask("A?");
    socket.faults.push(slowBy(1500, 1));
    await expect(port.ask("*IDN?")).rejects.toMatchObject({ code: "no-answer" });
    expect(await port.ask("B?")).toBe("re B?");
  });

  it("refuses control bytes in an answer and goes on in step", async () => {
    await port.ask("A?");
    socket.faults.push(garbled(1));
    await expect(port.ask("B?")).rejects.toMatchObject({ code: "garbled-reply" });
    expect(await port.ask("C?")).toBe("re C?");
  });

  it.each([
    ["a NUL", "re \u0000B?"],
    ["a tabulator", "re\tB?"],
    ["a letter beyond ASCII", "re Bé"],
    ["a line without a character", "\r"],
    ["a line of 257 bytes", "x".repeat(257)],
  ])("refuses %s", async (_what, text) => {
    await port.ask("A?");
    socket.faults.push({ isSpent: false, meet: (line) => (line === "B?" ? { text, lateMs: 0 } : null) });
    await expect(port.ask("B?")).rejects.toMatchObject({ code: "garbled-reply" });
    expect(await port.ask("C?")).toBe("re C?");
  });

  it("takes a line of 256 bytes", async () => {
    await port.ask("A?");
    const text = "x".repeat(256);
    socket.faults.push({ isSpent: false, meet: (line) => (line === "B?" ? { text, lateMs: 0 } : null) });
    expect(await port.ask("B?")).toBe(text);
  });

  it("survives a megabyte without a line end, and keeps none of it", async () => {
    await port.ask("A?");
    socket.port!.inject("x".repeat(1_000_000));
    await expect(port.ask("B?")).rejects.toMatchObject({ code: "garbled-reply" });
    expect(await port.ask("C?")).toBe("re C?");
    expect(Math.max(...port.trace.map(({ line }) => line.length))).toBeLessThanOrEqual(257);
  });

  it("gives up a line that is never quiet instead of waiting for ever", async () => {
    await port.ask("A?");
    socket.faults.push(silent(1));
    await expect(port.ask("B?")).rejects.toMatchObject({ code: "no-answer" });
    let isNoisy = true;
    const noise = () => {
      if (isNoisy) clock.schedule(20, () => (socket.port!.inject("x"), noise()));
    };
    noise();
    await expect(port.ask("C?")).rejects.toMatchObject({ code: "garbled-reply", message: /without a pause/u });
    isNoisy = false;
    await clock.sleep(100);
    socket.port!.inject("\n");
    expect(await port.ask("D?")).toBe("re D?");
  });

  it("ignores what nobody asked for", async () => {
    await port.ask("A?");
    socket.port!.inject("re X?\n");
    await clock.sleep(10);
    expect(await port.ask("B?")).toBe("re B?");
  });

  it("keeps the newest lines in both directions with their times", async () => {
    for (let count = 0; count < 400; count += 1) await port.ask(`Q${count}?`);
    const { trace } = port;
    expect(trace.length).toBeGreaterThan(400);
    expect(trace.length).toBeLessThanOrEqual(500);
    expect(trace.at(-2)).toMatchObject({ direction: "sent", line: "Q399?" });
    expect(trace.at(-1)).toMatchObject({ direction: "received", line: "re Q399?", atMs: clock.nowMs() });
  });
});

describe("an urgent line", () => {
  it("is on the wire at once, before the answer that is waited for; the cancelled question is asked again", async () => {
    await port.ask("A?");
    socket.faults.push(slowBy(300, 1));
    const beganMs = clock.monotonicMs();
    const asking = port.ask("B?");
    await clock.sleep(10);
    await port.sendUrgent("OUTP OFF");
    expect(clock.monotonicMs() - beganMs).toBe(10);
    expect(received.at(-1)).toBe("OUTP OFF");
    expect(await asking).toBe("re B?");
  });

  it("is not followed by a line that was waiting before it", async () => {
    await port.ask("A?");
    const asking = port.ask("B?");
    const switching = port.send("OUTP ON");
    const urgent = port.sendUrgent("OUTP OFF");
    await expect(switching).rejects.toMatchObject({ code: "refused", message: /OUTP ON.*urgent line went first/u });
    await urgent;
    await asking;
    expect(received).not.toContain("OUTP ON");
    await port.send("OUTP ON");
    expect(received.at(-1)).toBe("OUTP ON");
  });

  it("goes through while the device is silent", async () => {
    await port.ask("A?");
    socket.faults.push(silent(10));
    const asking = port.ask("B?");
    await clock.sleep(500);
    await port.sendUrgent("OUTP OFF");
    expect(received.at(-1)).toBe("OUTP OFF");
    await expect(asking).rejects.toMatchObject({ code: "no-answer" });
  });
});

describe("the loss of a port", () => {
  it("is noticed while nobody asks, and told once", async () => {
    const losses: DriverError[] = [];
    port.onLost((error) => losses.push(error));
    socket.unplug();
    await clock.sleep(1);
    expect(port.isOpen).toBe(false);
    expect(losses.map(({ code, message }) => [code, message])).toEqual([
      ["port-lost", "The port sim:echo of the meter is gone."],
    ]);
  });

  it("ends the exchange under way and refuses the next ones", async () => {
    await port.ask("A?");
    socket.faults.push(slowBy(500, 1));
    const asking = port.ask("B?");
    const waiting = port.ask("C?");
    clock.schedule(100, () => socket.unplug());
    await expect(asking).rejects.toMatchObject({ code: "port-lost" });
    await expect(waiting).rejects.toMatchObject({ code: "port-lost" });
    await expect(port.sendUrgent("OUTP OFF")).rejects.toMatchObject({ code: "port-lost" });
  });

  it("is mended by opening again, however often; nothing of the old connection is left", async () => {
    for (let cycle = 0; cycle < 100; cycle += 1) {
      expect(await port.ask(`A${cycle}?`)).toBe(`re A${cycle}?`);
      const asking = port.ask("LOST?").catch((error: DriverError) => error.code);
      await clock.sleep(1);
      socket.unplug();
      expect(await asking).toBe("port-lost");
      await expect(port.open()).rejects.toMatchObject({ code: "port-lost" });
      socket.plugIn();
      await port.open();
    }
    expect(port.openings).toBe(101);
  });

  it("waits until the machine has let the port go before it opens it again", async () => {
    const slow = new SimulatedBinding(new Map([[PATH, socket]]), clock);
    const letGo = async (open: Promise<SimulatedPort>) => {
      const opened = await open;
      const close = opened.close.bind(opened);
      opened.close = () => clock.sleep(300).then(close);
      return opened;
    };
    const binding = { list: () => slow.list(), open: (settings: PortSettings) => letGo(slow.open(settings)) };
    await port.close();
    port = new LinePort({ device: "meter", path: PATH, baudRate: 9600, clock, binding });
    await port.open();
    socket.unplug();
    await clock.sleep(1);
    socket.plugIn();
    await port.open();
    expect(await port.ask("A?")).toBe("re A?");
  });

  it("opens once for two callers at the same time", async () => {
    socket.unplug();
    await clock.sleep(1);
    socket.plugIn();
    await Promise.all([port.open(), port.open()]);
    expect(port.openings).toBe(2);
    expect(await port.ask("A?")).toBe("re A?");
  });

  it("does not follow from closing, which may be done twice", async () => {
    const losses: DriverError[] = [];
    port.onLost((error) => losses.push(error));
    await port.ask("A?");
    const asking = port.ask("B?").catch((error: DriverError) => error.code);
    await clock.sleep(1);
    await port.close();
    await port.close();
    expect(await asking).toBe("port-lost");
    expect(losses).toEqual([]);
  });
});
