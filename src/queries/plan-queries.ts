import {
  keepPreviousData,
  queryOptions,
  useMutation,
  useQueryClient,
  type QueryClient,
} from '@tanstack/react-query';
import type { z } from 'zod';
import {
  EditResult,
  NextContacts,
  type Edit,
  type OperationalChange,
} from '../../shared/schemas/edit.ts';
import {
  ContactLog,
  ContactLogList,
  type PutContactLog,
} from '../../shared/schemas/contact-log.ts';
import {
  OpenPassPage,
  Plan,
  PlanChanges,
  PlanFacts,
  PlanPage,
  type CreatePlan,
  type ReleasePlan,
  type Sign,
} from '../../shared/schemas/plan.ts';
import { RunStarted, type CreateAssignmentRun } from '../../shared/schemas/run.ts';
import { callApi, callApiForAll, tagOf } from '../lib/api-client.ts';

export interface PlanFilter {
  stationId: string;
  fromDay: string;
  toDay: string;
}
type Tagged = { id: string; version: number };

export const planQueries = {
  all: ['plans'] as const,
  list: (filter: PlanFilter) =>
    queryOptions({
      queryKey: [...planQueries.all, 'list', filter],
      queryFn: ({ signal }) =>
        callApiForAll('/api/plans', PlanPage, { query: { ...filter }, signal }),
      placeholderData: keepPreviousData,
    }),
  one: (id: string) =>
    queryOptions({
      queryKey: [...planQueries.all, id],
      queryFn: ({ signal }) => callApi(`/api/plans/${id}`, Plan, { signal }),
    }),
  openPasses: (id: string, version: number) =>
    queryOptions({
      queryKey: [...planQueries.all, id, 'open-passes', version],
      queryFn: ({ signal }) =>
        callApiForAll(`/api/plans/${id}/open-passes`, OpenPassPage, { signal }),
      placeholderData: keepPreviousData,
    }),
  facts: (id: string, version: number) =>
    queryOptions({
      queryKey: [...planQueries.all, id, 'facts', version],
      queryFn: ({ signal }) => callApi(`/api/plans/${id}/facts`, PlanFacts, { signal }),
      placeholderData: keepPreviousData,
    }),
  changes: (id: string, against?: number) =>
    queryOptions({
      queryKey: [...planQueries.all, id, 'changes', against ?? null],
      queryFn: ({ signal }) =>
        callApi(`/api/plans/${id}/changes`, PlanChanges, { query: { against }, signal }),
    }),
  logs: (id: string) =>
    queryOptions({
      queryKey: [...planQueries.all, id, 'logs'],
      queryFn: async ({ signal }) =>
        (await callApi(`/api/plans/${id}/logs`, ContactLogList, { signal })).items,
    }),
  nextContacts: (satelliteId: string, stationId: string, uplink: boolean) =>
    queryOptions({
      queryKey: [...planQueries.all, 'next-contacts', satelliteId, stationId, uplink],
      queryFn: async ({ signal }) =>
        (
          await callApi(`/api/satellites/${satelliteId}/next-contacts`, NextContacts, {
            query: { stationId, uplink },
            signal,
          })
        ).items,
    }),
};

/** Answers that belong to one version of a plan: a new version asks for them by itself, so they are not read twice. */
const OF_ONE_VERSION = new Set<unknown>(['open-passes', 'facts', 'judge']);

/** Plans are read again; what is costly and keyed by version is left to the version. */
export const refreshPlans = (client: QueryClient): Promise<void> =>
  client.invalidateQueries({
    predicate: ({ queryKey }) => queryKey[0] === 'plans' && !OF_ONE_VERSION.has(queryKey[2]),
  });

/** A change of plans; whatever comes of it, plans are read again. */
function usePlanChange<Body, Answer>(change: (body: Body) => Promise<Answer>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: change,
    onSettled: () => refreshPlans(client),
  });
}

const post = <T extends z.ZodType>(plan: Tagged, act: string, answer: T, body: unknown) =>
  callApi(`/api/plans/${plan.id}/${act}`, answer, { method: 'POST', body, ifMatch: tagOf(plan) });

export const useCreatePlan = () =>
  usePlanChange((body: CreatePlan) => callApi('/api/plans', Plan, { method: 'POST', body }));

/** Edits show at once, from their own answer; scores and results follow when the plan is read again. */
export function useEditPlan() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ plan, edits }: { plan: Tagged; edits: Edit[] }) =>
      post(plan, 'edits', EditResult, { edits }),
    onSuccess: (result, { plan }) =>
      client.setQueryData(planQueries.one(plan.id).queryKey, (known) =>
        known ? withEdits(known, result) : known,
      ),
    onSettled: () => refreshPlans(client),
  });
}

/** A plan with the contacts that an edit has changed, added or taken off. */
export function withEdits(plan: Plan, { version, contacts, removedIds }: EditResult): Plan {
  const changed = new Map(contacts.map((contact) => [contact.id, contact]));
  const gone = new Set(removedIds);
  const kept = plan.contacts
    .filter(({ id }) => !gone.has(id))
    .map((contact) => changed.get(contact.id) ?? contact);
  const known = new Set(plan.contacts.map(({ id }) => id));
  const added = contacts.filter(({ id }) => !known.has(id) && !gone.has(id));
  return { ...plan, version, contacts: [...kept, ...added] };
}

/** Judges edits without making them; the answer lists every broken rule. */
export const judgeEdits = (plan: Tagged, edits: Edit[], signal: AbortSignal) =>
  callApi(`/api/plans/${plan.id}/edits`, EditResult, {
    method: 'POST',
    query: { dryRun: true },
    body: { edits },
    ifMatch: tagOf(plan),
    signal,
  });

export const useSetLimitOfDay = () =>
  usePlanChange(({ plan, limitOfDayDb }: { plan: Tagged; limitOfDayDb: number }) =>
    callApi(`/api/plans/${plan.id}`, Plan, {
      method: 'PATCH',
      body: { limitOfDayDb },
      ifMatch: tagOf(plan),
    }),
  );
export const useStartAssignment = () =>
  usePlanChange(({ plan, body }: { plan: Tagged; body: CreateAssignmentRun }) =>
    post(plan, 'assignment-runs', RunStarted, body),
  );
export const useSubmitPlan = () => usePlanChange((plan: Tagged) => post(plan, 'submit', Plan, {}));
export const useWithdrawPlan = () =>
  usePlanChange(({ plan, reason }: { plan: Tagged; reason: string }) =>
    post(plan, 'withdraw', Plan, reason ? { reason } : {}),
  );
export const useReleasePlan = () =>
  usePlanChange(({ plan, body }: { plan: Tagged; body: ReleaseBody }) =>
    post(plan, 'release', Plan, body),
  );
type ReleaseBody = z.input<typeof ReleasePlan>;
export const useRevisePlan = () => usePlanChange((plan: Tagged) => post(plan, 'revise', Plan, {}));
export const useSignPlan = () =>
  usePlanChange(({ plan, body }: { plan: Tagged; body: Sign }) =>
    post(plan, 'sign-offs', Plan, body),
  );
export const useOperatePlan = () =>
  usePlanChange(({ plan, change }: { plan: Tagged; change: OperationalChange }) =>
    post(plan, 'operational-changes', Plan, change),
  );
export const useLogContact = () =>
  usePlanChange(({ contactId, body }: { contactId: string; body: PutContactLog }) =>
    callApi(`/api/contacts/${contactId}/log`, ContactLog, { method: 'PUT', body }),
  );
