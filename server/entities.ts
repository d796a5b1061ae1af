import { AuditRow } from './modules/audit/audit-event.entity.ts';
import { ElementSet, ElementSetUpload } from './modules/element-sets/element-set.entity.ts';
import { MailRow } from './modules/mail/mail.entity.ts';
import { Mission, MissionLead } from './modules/missions/mission.entity.ts';
import { RequestRow, RequirementRow } from './modules/missions/requirement.entity.ts';
import { Pass, Prediction } from './modules/passes/pass.entity.ts';
import { Contact, ContactLogRow, PlannedContact } from './modules/plans/contact.entity.ts';
import { DayPlan } from './modules/plans/plan.entity.ts';
import { Round, SignOffRow } from './modules/plans/sign-off.entity.ts';
import { RunRow } from './modules/runs/run.entity.ts';
import { Satellite } from './modules/satellites/satellite.entity.ts';
import { SessionRow } from './modules/sessions/session.entity.ts';
import { Channel } from './modules/stations/channel.entity.ts';
import { Closure } from './modules/stations/closure.entity.ts';
import { Face } from './modules/stations/face.entity.ts';
import { Station } from './modules/stations/station.entity.ts';
import { Setting } from './modules/users/setting.entity.ts';
import { User } from './modules/users/user.entity.ts';

export const entities = [
  Setting,
  User,
  SessionRow,
  AuditRow,
  MailRow,
  RunRow,
  Station,
  Face,
  Channel,
  Closure,
  Mission,
  MissionLead,
  RequirementRow,
  RequestRow,
  Satellite,
  ElementSetUpload,
  ElementSet,
  Pass,
  Prediction,
  DayPlan,
  Contact,
  PlannedContact,
  ContactLogRow,
  Round,
  SignOffRow,
];
