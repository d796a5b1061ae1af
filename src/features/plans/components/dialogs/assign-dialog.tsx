import { useState } from 'react';
import { fitsChannel } from '../../../../../shared/schedule/radio-fit.ts';
import type { Edit } from '../../../../../shared/schemas/edit.ts';
import type { OpenPass } from '../../../../../shared/schemas/plan.ts';
import { toIso, type Interval } from '../../../../../shared/time.ts';
import { Button } from '../../../../components/button.tsx';
import { Dialog } from '../../../../components/dialog.tsx';
import { SelectField } from '../../../../components/field.tsx';
import { passWords } from '../../../../lib/format-number.ts';
import { usePlanDesk, type PlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanEdits } from '../../hooks/plan-edits.ts';
import { usePlanView } from '../../hooks/plan-view.ts';
import { useJudgement } from '../../hooks/use-judgement.ts';
import { JudgementBox } from './judgement-box.tsx';
import { LegFields, draftOf, intervalOf, inward, type LegDraft } from './leg-fields.tsx';

interface Props {
  pass: OpenPass;
  channelId: string | null;
  onClose: () => void;
}

/** Puts an open pass on the plan by hand. */
export function AssignDialog({ pass, channelId, onClose }: Props) {
  const desk = usePlanDesk();
  const { apply, isBusy } = usePlanEdits();
  const { showContact } = usePlanView();
  const [version] = useState(desk.plan.version);
  const faces = usableFaces(desk, pass);
  const first = channelId ? desk.columns.get(channelId)?.face.id : undefined;
  const [faceId, setFaceId] = useState(first ?? faces[0]?.id ?? '');
  const windows = windowsOfFace(desk, pass, faceId);
  const [receive, setReceive] = useState(() =>
    firstDraft(desk, pass, { faceId, direction: 'receive', wanted: channelId }),
  );
  const [transmit, setTransmit] = useState(() =>
    firstDraft(desk, pass, { faceId, direction: 'transmit', wanted: null }),
  );
  const near = windows.receive ?? {
    fromMs: Date.parse(pass.aosUtc),
    toMs: Date.parse(pass.losUtc),
  };
  const edits = editsOf(pass, { receive, transmit, near, nearUplink: windows.transmit ?? near });
  const judgement = useJudgement(desk.plan, edits);
  const changeFace = (id: string): void => {
    setFaceId(id);
    setReceive(firstDraft(desk, pass, { faceId: id, direction: 'receive', wanted: null }));
    setTransmit(firstDraft(desk, pass, { faceId: id, direction: 'transmit', wanted: null }));
  };
  const save = (): void => {
    if (!edits) return;
    apply(edits, `${pass.satelliteName} assigned to ${desk.labelOf(receive.channelId)}.`, {
      version,
      onDone: () => {
        onClose();
        showContact('', near);
      },
    });
  };
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Assign ${pass.satelliteName}`}
      description={passWords(desk.passes.get(pass.passId) ?? pass)}
      footer={
        <>
          <Button onClick={onClose}>Leave it open</Button>
          <Button
            variant="primary"
            busy={isBusy}
            disabled={judgement.state !== 'holds'}
            onClick={save}
          >
            Assign pass
          </Button>
        </>
      }
    >
      <div className="flex flex-col gap-4">
        {faces.length > 1 && (
          <SelectField
            label="Face"
            value={faceId}
            onChange={(event) => changeFace(event.target.value)}
          >
            {faces.map(({ id, label }) => (
              <option key={id} value={id}>
                {label}
              </option>
            ))}
          </SelectField>
        )}
        <LegFields
          legend="Receive leg"
          direction="receive"
          faceId={faceId}
          draft={receive}
          onChange={setReceive}
          window={windows.receive}
          near={near}
          autoFocus="channel"
        />
        {desk.satellites.get(pass.satelliteId)?.uplink && (
          <LegFields
            legend="Uplink"
            direction="transmit"
            faceId={faceId}
            draft={transmit}
            onChange={setTransmit}
            window={windows.transmit}
            near={windows.transmit ?? near}
            none="No uplink"
          />
        )}
      </div>
      <JudgementBox judgement={judgement} />
    </Dialog>
  );
}

const usableFaces = (desk: PlanDesk, pass: OpenPass) => {
  const windows = desk.passes.get(pass.passId)?.windows ?? [];
  return desk.faces.filter(({ id }) =>
    windows.some((window) => window.faceId === id && window.direction === 'receive'),
  );
};

function windowsOfFace(desk: PlanDesk, pass: OpenPass, faceId: string) {
  const longest = (direction: 'receive' | 'transmit'): Interval | null => {
    const windows = (desk.passes.get(pass.passId)?.windows ?? [])
      .filter((window) => window.faceId === faceId && window.direction === direction)
      .map(({ fromUtc, toUtc }) => ({ fromMs: Date.parse(fromUtc), toMs: Date.parse(toUtc) }))
      .sort((a, b) => b.toMs - b.fromMs - (a.toMs - a.fromMs));
    return windows[0] ?? null;
  };
  return { receive: longest('receive'), transmit: longest('transmit') };
}

interface Wish {
  faceId: string;
  direction: 'receive' | 'transmit';
  wanted: string | null;
}

/** A first proposal: the whole usable window, on the first channel that fits and is free then. */
function firstDraft(desk: PlanDesk, pass: OpenPass, { faceId, direction, wanted }: Wish): LegDraft {
  const window = windowsOfFace(desk, pass, faceId)[direction];
  const satellite = desk.satellites.get(pass.satelliteId);
  const radio = direction === 'receive' ? satellite?.downlink : satellite?.uplink;
  const span = window && inward(window);
  const fitting = [...desk.columns.values()].filter(
    ({ channel, face }) =>
      channel.direction === direction && face.id === faceId && radio && fitsChannel(channel, radio),
  );
  const free = fitting.find(
    ({ id }) =>
      span &&
      !desk.legs.some(
        (leg) => leg.channelId === id && leg.fromMs < span.toMs && span.fromMs < leg.toMs,
      ),
  );
  const chosen = wanted ?? free?.id ?? (direction === 'receive' ? fitting[0]?.id : undefined) ?? '';
  if (!span) return { channelId: '', from: '', to: '' };
  return draftOf(direction === 'transmit' && !free ? '' : chosen, span);
}

function editsOf(
  pass: OpenPass,
  {
    receive,
    transmit,
    near,
    nearUplink,
  }: { receive: LegDraft; transmit: LegDraft; near: Interval; nearUplink: Interval },
): Edit[] | null {
  const span = intervalOf(receive, near);
  if (!span || receive.channelId === '') return null;
  const wantsUplink = transmit.channelId !== '';
  const uplink = wantsUplink ? intervalOf(transmit, nearUplink) : null;
  if (wantsUplink && !uplink) return null;
  const leg = (channelId: string, { fromMs, toMs }: Interval) => ({
    channelId,
    fromUtc: toIso(fromMs),
    toUtc: toIso(toMs),
  });
  return [
    {
      op: 'assign',
      passId: pass.passId,
      receive: leg(receive.channelId, span),
      transmit: uplink ? leg(transmit.channelId, uplink) : null,
    },
  ];
}
