import type { ContactModel } from '../../../shared/schedule/model.ts';
import type { PlannedContact } from './contact.entity.ts';

/** The planner's view of a stored contact. */
export const toContactModel = (row: PlannedContact): ContactModel => ({
  id: row.contact.id,
  passId: row.contact.pass.id,
  predictionId: row.prediction.id,
  satelliteId: row.contact.satellite.id,
  missionId: row.contact.satellite.mission.id,
  faceId: row.face.id,
  receive: {
    channelId: row.receiveChannel.id,
    fromMs: row.receiveFromMs,
    toMs: row.receiveToMs,
  },
  transmit:
    row.transmitChannel && row.transmitFromMs != null && row.transmitToMs != null
      ? {
          channelId: row.transmitChannel.id,
          fromMs: row.transmitFromMs,
          toMs: row.transmitToMs,
        }
      : null,
  locked: row.locked,
});
