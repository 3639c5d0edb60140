import 'server-only';
import { getDb, type Tx } from '@/db/client';
import { fills, pulls } from '@/db/schema';
import { and, eq } from 'drizzle-orm';
import { requireCapability, type Access } from '../auth/access';
import { now } from '../clock';
import { AppError } from '../errors';
import { insertPull } from '../register/mutations';
import type { PhonePull, PullsAnswer } from './schema';

/** A clock that is off by less than this is taken at its word. */
const AHEAD_MS = 5 * 60_000;

const noteOf = ({ colour, note }: PhonePull): string => [colour && `Colour: ${colour}.`, note].filter(Boolean).join(' ');

/** What a pull says, but for its time: a clock that ran ahead was set right. */
const FACTS = ['drawMethod', 'volumeMl', 'temperatureC', 'evaporationS', 'isVented', 'isHissHeard', 'isToppedUp'] as const;

/** Whether the stored pull says what this one says: a repeat of the same delivery. Null when there is none. */
function isRepeat(tx: Tx, access: Access, pull: PhonePull): boolean | null {
  const kept = tx
    .select({ pull: pulls, vesselId: fills.vesselId })
    .from(pulls)
    .innerJoin(fills, eq(fills.id, pulls.fillId))
    .where(and(eq(pulls.id, pull.opId), eq(pulls.cellarId, access.cellar.id)))
    .get();
  if (!kept) return null;
  return kept.vesselId === pull.vesselId && kept.pull.pulledBy === access.user.id && kept.pull.note === noteOf(pull) && FACTS.every((fact) => kept.pull[fact] === pull[fact]);
}

/**
 * Takes the pulls that a cellar hand's phone kept, whole or not at all. The phone's id is the pull's: a
 * repeat counts once, other content under the same id is refused. What can never be taken (a barrel
 * that was empty, or is not here) is refused one by one and holds up nothing.
 * @throws AppError `forbidden`
 */
export function takePulls(access: Access, sent: readonly PhonePull[]): PullsAnswer {
  requireCapability(access, 'pull.record');
  const answer: PullsAnswer = { protocol: 1, received: [], refused: [] };
  getDb().transaction((tx) => {
    for (const pull of sent) {
      const repeat = isRepeat(tx, access, pull);
      if (repeat === false) answer.refused.push({ opId: pull.opId, message: 'A pull with this id was received with other content.' });
      if (repeat === true) answer.received.push(pull.opId);
      if (repeat !== null) continue;
      try {
        // A phone whose clock runs ahead can't make a pull of tomorrow: then it is now.
        const pulledAt = new Date(Math.min(pull.pulledAt, now().getTime() + AHEAD_MS));
        insertPull(tx, access, {
          id: pull.opId, vesselId: pull.vesselId, pulledAt, drawMethod: pull.drawMethod, volumeMl: pull.volumeMl, temperatureC: pull.temperatureC,
          isSanitised: true, evaporationS: pull.evaporationS, isVented: pull.isVented, isHissHeard: pull.isHissHeard, isResealed: true,
          isToppedUp: pull.isToppedUp, toppedWith: '', isWiped: true, note: noteOf(pull),
        });
        answer.received.push(pull.opId);
      } catch (error) {
        if (!(error instanceof AppError)) throw error;
        answer.refused.push({ opId: pull.opId, message: error.message });
      }
    }
  }, { behavior: 'immediate' });
  return answer;
}
