import { MINUTE_MS } from '../../time.ts';
import type { ContactModel, DayModel, LegModel } from '../model.ts';
import { judgeRequests, type RequestResult } from './requests.ts';
import { judgeRequirements, type RequirementResult } from './requirements.ts';

export interface MissionScore {
  missionId: string;
  contacts: number;
  receiveMinutes: number;
  transmitMinutes: number;
  unmet: number;
}

export interface PlanScore {
  contacts: number;
  receiveMinutes: number;
  transmitMinutes: number;
  requirementsMet: number;
  requirementsUnmet: number;
  requestsMet: number;
  requestsUnmet: number;
  missions: MissionScore[];
  requirements: RequirementResult[];
  requests: RequestResult[];
}

const minutes = (legs: readonly (LegModel | null)[]): number =>
  legs.reduce((sum, leg) => sum + (leg ? leg.toMs - leg.fromMs : 0), 0) / MINUTE_MS;

/** What a plan gives: minutes, contacts, and every requirement and request held against it. */
export function scorePlan(day: DayModel, contacts: readonly ContactModel[]): PlanScore {
  const requirements = judgeRequirements(day, contacts);
  const requests = judgeRequests(day, contacts);
  const missions = day.missions.map((mission) => {
    const own = contacts.filter(({ missionId }) => missionId === mission.id);
    return {
      missionId: mission.id,
      contacts: own.length,
      receiveMinutes: minutes(own.map(({ receive }) => receive)),
      transmitMinutes: minutes(own.map(({ transmit }) => transmit)),
      unmet: requirements.filter((one) => one.missionId === mission.id && !one.met).length,
    };
  });
  return {
    contacts: contacts.length,
    receiveMinutes: minutes(contacts.map(({ receive }) => receive)),
    transmitMinutes: minutes(contacts.map(({ transmit }) => transmit)),
    requirementsMet: requirements.filter(({ met }) => met).length,
    requirementsUnmet: requirements.filter(({ met }) => !met).length,
    requestsMet: requests.filter(({ met }) => met).length,
    requestsUnmet: requests.filter(({ met }) => !met).length,
    missions,
    requirements,
    requests,
  };
}
