// Hashing takes a quarter of a second of pure computation: here it stalls nobody.
import { parentPort } from "node:worker_threads";
import bcrypt from "bcryptjs";

parentPort.on("message", ({ id, kind, password, hash, cost }) => {
  try {
    const result = kind === "hash" ? bcrypt.hashSync(password, cost) : bcrypt.compareSync(password, hash);
    parentPort.postMessage({ id, result });
  } catch (error) {
    parentPort.postMessage({ id, failure: String(error) });
  }
});
