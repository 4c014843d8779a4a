/** Every event by its name: what the one route of the server, the forms and the API page run. */
import { acknowledge } from './acknowledge.ts';
import { correction } from './correction.ts';
import type { EventDefinition, EventName } from './definition.ts';
import { delivery } from './delivery.ts';
import { disputeHandover } from './dispute-handover.ts';
import { hold } from './hold.ts';
import { issue } from './issue.ts';
import { opening } from './opening.ts';
import { ownership } from './ownership.ts';
import { arrive, consign } from './refining/consign.ts';
import { outturn } from './refining/outturn.ts';
import { settle } from './refining/settle.ts';
import { sweepUp } from './refining/sweep-up.ts';
import { release } from './release.ts';
import { returnToOwner } from './return-to-owner.ts';
import { reversal } from './reversal.ts';
import { settleDispute } from './settle-dispute.ts';
import { transfer } from './transfer.ts';
import { useUp } from './use-up.ts';
import { weighBack } from './weigh-back/weigh-back.ts';
import { weighIn } from './weigh-in.ts';
import {
  changeCustodian,
  closeAccount,
  closePeriod,
  explainLoss,
  openJob,
  openOperation,
  openPlace,
  renameAccount,
  reopenPeriod,
  setAllowance,
  setAlloy,
  setParty,
  setPrice,
  setSetting,
} from './workshop/index.ts';
import { writeOff } from './write-off.ts';

export const EVENTS: Readonly<Record<EventName, EventDefinition<unknown>>> = {
  opening,
  'weigh-in': weighIn,
  hold,
  release,
  transfer,
  issue,
  acknowledge,
  'dispute-handover': disputeHandover,
  'settle-dispute': settleDispute,
  'weigh-back': weighBack,
  delivery,
  'sweep-up': sweepUp,
  consign,
  arrive,
  outturn,
  settle,
  'use-up': useUp,
  ownership,
  'return-to-owner': returnToOwner,
  'write-off': writeOff,
  correction,
  reversal,
  'open-place': openPlace,
  'open-operation': openOperation,
  'rename-account': renameAccount,
  'close-account': closeAccount,
  'change-custodian': changeCustodian,
  'set-party': setParty,
  'set-alloy': setAlloy,
  'set-price': setPrice,
  'set-allowance': setAllowance,
  'set-setting': setSetting,
  'open-job': openJob,
  'close-period': closePeriod,
  'reopen-period': reopenPeriod,
  'explain-loss': explainLoss,
};
