import { useQueryClient, type QueryKey } from '@tanstack/react-query';
import { useEffect } from 'react';
import { z } from 'zod';

const Thin = z.looseObject({ topic: z.string(), id: z.string().optional() });

/** What a topic of the stream makes worth reading again; the reading itself keeps the access rules. */
const KEYS: Record<string, QueryKey[]> = {
  plan: [['plans']],
  run: [],
  elements: [['element-sets'], ['satellites'], ['passes'], ['plans']],
  passes: [['passes'], ['plans']],
  fleet: [['satellites'], ['missions']],
  station: [['stations'], ['plans']],
  closure: [['stations'], ['plans']],
  mail: [['mails']],
};
const GATHER_MS = 400;

/** Changes of others appear without reload: one server-sent stream a tab. */
export function useLiveEvents(enabled: boolean): void {
  const client = useQueryClient();
  useEffect(() => {
    if (!enabled) return undefined;
    const source = new EventSource('/api/events');
    const waiting = new Map<string, QueryKey>();
    let timer = 0;
    const flush = (): void => {
      timer = 0;
      for (const queryKey of waiting.values()) void client.invalidateQueries({ queryKey });
      waiting.clear();
    };
    source.onmessage = (message: MessageEvent<string>) => {
      const event = Thin.safeParse(readJson(message.data));
      if (!event.success) return;
      const { topic, id } = event.data;
      const keys = topic === 'run' && id ? [['runs', id]] : (KEYS[topic] ?? []);
      for (const key of keys) waiting.set(key.join(), key);
      if (timer === 0) timer = window.setTimeout(flush, GATHER_MS);
    };
    return () => {
      source.close();
      window.clearTimeout(timer);
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
