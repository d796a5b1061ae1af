import { useQueryClient, type QueryClient, type QueryKey } from '@tanstack/react-query';
import { useEffect } from 'react';
import { z } from 'zod';
import { refreshPlans } from '../queries/plan-queries.ts';

const Thin = z.looseObject({ topic: z.string(), id: z.string().optional() });

/** What a topic of the stream makes worth reading again; the reading itself keeps the access rules. */
const KEYS: Record<string, QueryKey[]> = {
  plan: [],
  run: [],
  elements: [['element-sets'], ['satellites'], ['passes'], ['plans']],
  passes: [['passes'], ['plans']],
  fleet: [['satellites'], ['missions']],
  station: [['stations'], ['plans']],
  closure: [['stations'], ['plans']],
  mail: [['mails']],
};
const GATHER_MS = 400;

/** The stream is opened when the page has read what it shows: first things first, and a page that loads comes to rest. */
const CALM_MS = 1500;
const LOOK_MS = 250;

const whenCalm = (client: QueryClient, start: () => void): (() => void) => {
  let calmMs = 0;
  const timer = window.setInterval(() => {
    calmMs = client.isFetching() === 0 ? calmMs + LOOK_MS : 0;
    if (calmMs < CALM_MS) return;
    window.clearInterval(timer);
    start();
  }, LOOK_MS);
  return () => window.clearInterval(timer);
};

/** Gathers what events make worth reading again, so that a burst is one reading. */
const gatherer = (client: QueryClient) => {
  const waiting = new Map<string, QueryKey>();
  let timer = 0;
  let plansChanged = false;
  const flush = (): void => {
    timer = 0;
    if (plansChanged) void refreshPlans(client);
    plansChanged = false;
    for (const queryKey of waiting.values()) void client.invalidateQueries({ queryKey });
    waiting.clear();
  };
  return {
    add: (data: string): void => {
      const event = Thin.safeParse(readJson(data));
      if (!event.success) return;
      const { topic, id } = event.data;
      if (topic === 'plan') plansChanged = true;
      const keys = topic === 'run' && id ? [['runs', id]] : (KEYS[topic] ?? []);
      for (const key of keys) waiting.set(key.join(), key);
      if (timer === 0) timer = window.setTimeout(flush, GATHER_MS);
    },
    stop: () => window.clearTimeout(timer),
  };
};

/** Changes of others appear without reload: one server-sent stream a tab. */
export function useLiveEvents(enabled: boolean): void {
  const client = useQueryClient();
  useEffect(() => {
    if (!enabled) return undefined;
    const gathered = gatherer(client);
    let source: EventSource | null = null;
    const stopWaiting = whenCalm(client, () => {
      source = new EventSource('/api/events');
      source.onmessage = (message: MessageEvent<string>) => gathered.add(message.data);
    });
    return () => {
      stopWaiting();
      source?.close();
      gathered.stop();
    };
  }, [client, enabled]);
}

const readJson = (text: string): unknown => {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
};
