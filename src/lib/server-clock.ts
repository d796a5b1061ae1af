/** The server's time is the product's time: instants on screen come from it, not from the machine's own clock. */
let offsetMs = 0;

export function setServerTime(serverTimeUtc: string): void {
  offsetMs = Date.parse(serverTimeUtc) - Date.now();
}

/** Now, ms UTC, by the server's clock. */
export const serverNow = (): number => Date.now() + offsetMs;
