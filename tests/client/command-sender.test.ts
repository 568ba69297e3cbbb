import { expect, it, vi } from "vitest";
import { ApiError, noAnswer } from "@/lib/client/api-error";
import { createCommandSender } from "@/lib/client/command-sender";
import type { RunCommand } from "@/lib/schemas/run";

function senderOver(answers: ("accepted" | "lost" | "refused")[]) {
  const posted: RunCommand[] = [];
  let ids = 0;
  const send = createCommandSender({
    post: (command) => {
      posted.push(command);
      const answer = answers.shift() ?? "accepted";
      if (answer === "lost") return Promise.reject(noAnswer(new Error("socket hang up")));
      if (answer === "refused") return Promise.reject(new ApiError("The run is over.", { status: 409, code: "over" }));
      return Promise.resolve();
    },
    newId: () => `id-${(ids += 1)}`,
    pause: () => Promise.resolve(),
  });
  return { send, posted };
}

it("repeats a send without an answer under the same id", async () => {
  const { send, posted } = senderOver(["lost", "lost", "accepted"]);
  await send("stop");
  expect(posted.map(({ id }) => id)).toEqual(["id-1", "id-1", "id-1"]);
});

it("keeps the id when a person presses again after silence", async () => {
  const { send, posted } = senderOver(["lost", "lost", "lost", "accepted"]);
  await expect(send("stop")).rejects.toMatchObject({ code: "no-answer" });
  await send("stop");
  expect(new Set(posted.map(({ id }) => id))).toEqual(new Set(["id-1"]));
});

it("makes a new id for the next command of the same kind", async () => {
  const { send, posted } = senderOver([]);
  await send("hold");
  await send("hold");
  expect(posted.map(({ id }) => id)).toEqual(["id-1", "id-2"]);
});

it("does not repeat a refused command, and says why it was refused", async () => {
  const { send, posted } = senderOver(["refused"]);
  await expect(send("resume")).rejects.toThrow("The run is over.");
  expect(posted).toHaveLength(1);
  await send("resume");
  expect(posted.map(({ id }) => id)).toEqual(["id-1", "id-2"]);
});

it("waits longer before each repetition", async () => {
  const pause = vi.fn(() => Promise.resolve());
  const post = () => Promise.reject(noAnswer(null));
  await expect(createCommandSender({ post, newId: () => "id-1", pause })("stop")).rejects.toThrow();
  expect(pause.mock.calls).toEqual([[300], [900]]);
});
