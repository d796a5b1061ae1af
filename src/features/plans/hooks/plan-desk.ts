import { createContext, use } from 'react';
import type { Closure, Channel } from '../../../../shared/schemas/channel.ts';
import type { ContactLog } from '../../../../shared/schemas/contact-log.ts';
import type { Face } from '../../../../shared/schemas/face.ts';
import type { Pass } from '../../../../shared/schemas/pass.ts';
import type {
  AnyContact,
  OpenPass,
  Plan,
  PlanAction,
  PlanFacts,
} from '../../../../shared/schemas/plan.ts';
import type { Satellite } from '../../../../shared/schemas/satellite.ts';
import type { Station } from '../../../../shared/schemas/station.ts';
import type { Interval } from '../../../../shared/time.ts';
import type { SkyGround } from '../../../charts/sky-ground.ts';
import type { MissionNames } from '../../../hooks/use-missions.ts';
import type { ColumnGroup, PlanColumn } from '../model/columns.ts';
import type { PlanLeg } from '../model/plan-legs.ts';

/** Everything a view of the plan looks at; read once, shared by all of them. */
export interface PlanDesk {
  plan: Plan;
  station: Station;
  span: Interval;
  faces: readonly Face[];
  channels: readonly Channel[];
  closures: readonly Closure[];
  groups: readonly ColumnGroup[];
  columns: ReadonlyMap<string, PlanColumn>;
  legs: readonly PlanLeg[];
  contacts: ReadonlyMap<string, AnyContact>;
  passes: ReadonlyMap<string, Pass>;
  satellites: ReadonlyMap<string, Satellite>;
  openPasses: readonly OpenPass[] | null;
  facts: PlanFacts | null;
  logs: ReadonlyMap<string, ContactLog>;
  missions: MissionNames;
  ground: SkyGround | null;
  allows: (action: PlanAction) => boolean;
  /** Label of a channel, such as R5. */
  labelOf: (channelId: string | null) => string;
}

export const PlanDeskContext = createContext<PlanDesk | null>(null);

export function usePlanDesk(): PlanDesk {
  const desk = use(PlanDeskContext);
  if (!desk) throw new Error('A part of the plan stands outside its desk');
  return desk;
}
