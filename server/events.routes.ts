import type { Response } from 'express';
import { mayEver } from '../shared/policy.ts';
import type { Deps, Person } from './deps.ts';
import type { DomainEvent } from './events.ts';
import { route } from './middleware/route.ts';

const HEARTBEAT_MS = 20_000;
/** Events that tell nothing but that something changed; a lead gets these only. */
const FOR_EVERYBODY = new Set<DomainEvent['topic']>([
  'plan',
  'passes',
  'station',
  'closure',
  'fleet',
]);

/** One open stream a tab: thin events, after which the client reads again, so access rules hold. */
export class EventStreams {
  readonly #open = new Map<Response, Person>();
  readonly #timer: NodeJS.Timeout;

  constructor(deps: Deps) {
    deps.bus.subscribe((event) => this.#pass(event));
    this.#timer = setInterval(() => {
      for (const response of this.#open.keys()) response.write(': still here\n\n');
    }, HEARTBEAT_MS);
    this.#timer.unref();
  }

  add(person: Person, response: Response): void {
    response.writeHead(200, {
      'Content-Type': 'text/event-stream; charset=utf-8',
      'Cache-Control': 'no-store',
      Connection: 'keep-alive',
    });
    response.write('retry: 3000\n\n');
    this.#open.set(response, person);
    response.on('close', () => this.#open.delete(response));
  }

  stop(): void {
    clearInterval(this.#timer);
    for (const response of this.#open.keys()) response.end();
    this.#open.clear();
  }

  #pass(event: DomainEvent): void {
    for (const [response, person] of this.#open) {
      if (event.topic === 'session-ended') {
        if (person.sessionId === event.id) response.end();
        continue;
      }
      const isOpenTo = FOR_EVERYBODY.has(event.topic) || mayEver(person, 'see.everything');
      if (!isOpenTo) continue;
      const id = event.topic === 'fleet' || event.topic === 'passes' ? '' : event.id;
      const thin = { topic: event.topic, id, version: event.version };
      response.write(`data: ${JSON.stringify(thin)}\n\n`);
    }
  }
}

export const eventRoutes = (streams: EventStreams) => [
  route({
    method: 'get',
    path: '/events',
    summary: 'Server-sent events: what has changed',
    access: 'session',
    action: 'see.plan-side',
    handler: ({ person, response }) => {
      streams.add(person, response);
      return { sent: true };
    },
  }),
];
