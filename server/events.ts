/**
 * What has happened, told after the commit. Modules further right in the line react to those on the left
 * through these events only (wired in app.ts); the stream of the clients carries them, too.
 */
export type DomainEvent =
  | { topic: 'plan'; id: string; version: number; stationId: string; day: string }
  | { topic: 'run'; id: string; version: number }
  | { topic: 'elements'; id: string; version: number; satelliteIds: string[]; runId?: string }
  | { topic: 'passes'; id: string; version: number }
  | { topic: 'fleet'; id: string; version: number }
  | { topic: 'station'; id: string; version: number; geometry: boolean }
  | { topic: 'closure'; id: string; version: number; stationId: string }
  | { topic: 'mail'; id: string; version: number }
  | { topic: 'session-ended'; id: string; version: number };

export type Listener = (event: DomainEvent) => void;

export class EventBus {
  readonly #listeners = new Set<Listener>();

  subscribe(listener: Listener): () => void {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  }

  emit(events: readonly DomainEvent[]): void {
    for (const event of events) for (const listener of this.#listeners) listener(event);
  }
}
