import { IdParams, PageQuery } from '../../../shared/schemas/common.ts';
import {
  CreateMission,
  Mission as MissionAnswer,
  MissionPage,
  PatchMission,
  StandingConsent,
} from '../../../shared/schemas/mission.ts';
import { reader, type Deps, type Work } from '../../deps.ts';
import { route, type Answer } from '../../middleware/route.ts';
import { tagOf } from '../../middleware/tags.ts';
import {
  createMission,
  deleteMission,
  getMission,
  listMissions,
  patchMission,
  setStandingConsent,
  withLeads,
  type MissionWithLeads,
} from './mission.service.ts';

const present = ({ mission, leads }: MissionWithLeads): MissionAnswer => ({
  id: mission.id,
  version: mission.version,
  name: mission.name,
  code: mission.code,
  series: mission.series,
  priority: mission.priority,
  leadIds: leads.map((lead) => lead.id),
  leadNames: leads.map((lead) => lead.name),
  retired: mission.retired,
});
const answer = (found: MissionWithLeads): Answer => ({
  body: present(found),
  etag: tagOf(found.mission.id, found.mission.version),
});

export const missionRoutes = (
  deps: Deps,
  inUse: (work: Work, missionId: string) => Promise<boolean>,
) => [
  route({
    method: 'get',
    path: '/missions',
    summary: 'Missions; a lead sees own ones',
    access: 'session',
    action: 'see.plan-side',
    query: PageQuery,
    answer: MissionPage,
    handler: async ({ query, person }) => {
      const found = await listMissions(reader(deps), person, query);
      return { body: { items: found.items.map(present), nextCursor: found.nextCursor } };
    },
  }),
  route({
    method: 'get',
    path: '/missions/:id',
    summary: 'One mission',
    access: 'session',
    action: 'see.plan-side',
    params: IdParams,
    answer: MissionAnswer,
    handler: async ({ params, person }) => {
      const em = reader(deps);
      const mission = await getMission(em, person, params.id);
      const [found] = await withLeads(em, [mission]);
      return answer(found ?? { mission, leads: [] });
    },
  }),
  route({
    method: 'post',
    path: '/missions',
    summary: 'Add a mission',
    access: 'session',
    action: 'create.missions',
    body: CreateMission,
    answer: MissionAnswer,
    status: 201,
    handler: async ({ person, body }) => answer(await createMission(deps, person, body)),
  }),
  route({
    method: 'patch',
    path: '/missions/:id',
    summary: 'Change a mission',
    access: 'session',
    action: 'edit.missions',
    params: IdParams,
    body: PatchMission,
    answer: MissionAnswer,
    tagged: true,
    handler: async ({ person, params, body, ifMatch }) =>
      answer(await patchMission(deps, person, { id: params.id, wish: body, ifMatch })),
  }),
  route({
    method: 'delete',
    path: '/missions/:id',
    summary: 'Delete a mission that nothing refers to',
    access: 'session',
    action: 'create.missions',
    params: IdParams,
    tagged: true,
    handler: async ({ person, params, ifMatch }) => {
      await deleteMission(deps, person, {
        id: params.id,
        ifMatch,
        inUse: (work) => inUse(work, params.id),
      });
      return { status: 204 };
    },
  }),
  route({
    method: 'put',
    path: '/missions/:id/standing-consent',
    summary: 'Approve by itself whenever all requirements are met',
    access: 'session',
    action: 'plan.sign',
    params: IdParams,
    body: StandingConsent,
    handler: async ({ person, params, body }) => {
      await setStandingConsent(deps, person, { id: params.id, given: body.given });
      return { status: 204 };
    },
  }),
];
