/** A random UUID (RFC 9562, version 4). `crypto.randomUUID` exists in secure contexts only; over plain http in a workshop network it does not. */
export function randomId(source: Crypto = globalThis.crypto): string {
  return typeof source.randomUUID === "function"
    ? source.randomUUID()
    : uuidFrom(source.getRandomValues(new Uint8Array(16)));
}

/** Sets the version and variant bits of 16 random bytes and writes them as a UUID (RFC 9562, 5.4). */
export function uuidFrom(bytes: Uint8Array): string {
  const marked = Uint8Array.from(bytes);
  marked[6] = (marked[6]! & 0x0f) | 0x40;
  marked[8] = (marked[8]! & 0x3f) | 0x80;
  const hex = Array.from(marked, (byte) => byte.toString(16).padStart(2, "0")).join("");
  return [hex.slice(0, 8), hex.slice(8, 12), hex.slice(12, 16), hex.slice(16, 20), hex.slice(20)].join("-");
}
