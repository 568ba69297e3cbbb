import { expect, it, vi } from "vitest";
import { createRunStore } from "@/lib/client/run-store";
import { emptyRun } from "@/lib/journal/run-state";
import { foldAll, sampleJournal } from "./sample-journal";

const records = sampleJournal();

it("folds batches into the state that the whole journal gives", () => {
  const store = createRunStore(emptyRun);
  for (let from = 0; from < records.length; from += 7) store.getState().receive(records.slice(from, from + 7));
  expect(store.getState().run).toEqual(foldAll(records));
});

it("changes once for a batch", () => {
  const store = createRunStore(emptyRun);
  const changed = vi.fn();
  store.subscribe(changed);
  store.getState().receive(records);
  expect(changed).toHaveBeenCalledTimes(1);
});

it("does not change for records that it has", () => {
  const store = createRunStore(foldAll(records.slice(0, 20)));
  const changed = vi.fn();
  store.subscribe(changed);
  expect(store.getState().receive(records.slice(5, 20))).toBe("current");
  expect(changed).not.toHaveBeenCalled();
});

it("takes an overlapping batch from the first record that is new", () => {
  const store = createRunStore(foldAll(records.slice(0, 20)));
  store.getState().receive(records.slice(10, 30));
  expect(store.getState().run).toEqual(foldAll(records.slice(0, 30)));
});

it("keeps what came before a gap and says that records are missing", () => {
  const store = createRunStore(emptyRun);
  const broken = [...records.slice(0, 10), ...records.slice(12)];
  expect(store.getState().receive(broken)).toBe("gap");
  expect(store.getState().run).toEqual(foldAll(records.slice(0, 10)));
  expect(store.getState().receive(records.slice(10))).toBe("current");
  expect(store.getState().run).toEqual(foldAll(records));
});

it("takes a newer state as a whole and leaves an older one", () => {
  const store = createRunStore(foldAll(records.slice(0, 10)));
  store.getState().replace(foldAll(records.slice(0, 40)));
  store.getState().replace(foldAll(records.slice(0, 5)));
  expect(store.getState().run.lastSeq).toBe(40);
});
