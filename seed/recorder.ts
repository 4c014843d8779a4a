/** Records the demo's days through the program's own services, at the times of those days. */
import { randomUUID } from 'node:crypto';
import { z } from '../shared/schemas/zod.ts';
import { EVENTS } from '../shared/events/index.ts';
import type { EventName } from '../shared/events/definition.ts';
import type { EventAnswer } from '../shared/schemas/event-answer.ts';
import type { Database } from '../server/db/database.ts';
import type { PersonInWorkshop } from '../server/services/events/person.ts';
import { recordEvent } from '../server/services/events/record-event.ts';
import type { CastMember } from './cast.ts';

export type Who = CastMember['key'];

/** The demo workshop while it is being made. */
export class Recorder {
  readonly db: Database;
  readonly workshop_id: string;
  readonly people: ReadonlyMap<Who, PersonInWorkshop>;
  /** Ids by name: places, parties, jobs. */
  readonly ids = new Map<string, string>();
  #day = '';

  constructor(db: Database, workshop_id: string, people: ReadonlyMap<Who, PersonInWorkshop>) {
    this.db = db;
    this.workshop_id = workshop_id;
    this.people = people;
  }

  /** The business date that is being worked. */
  get day(): string {
    return this.#day;
  }

  set day(date: string) {
    this.#day = date;
  }

  id(name: string): string {
    const found = this.ids.get(name);
    if (found === undefined) throw new Error(`the demo knows no ${name}`);
    return found;
  }

  person(who: Who): PersonInWorkshop {
    const found = this.people.get(who);
    if (found === undefined) throw new Error(`nobody is cast as ${who}`);
    return found;
  }

  /** Records an event at a time of the day ("10:41", UTC); a second person approves it where one is named. */
  async record(
    time: string,
    who: Who,
    name: EventName,
    body: object,
    approved_by?: Who,
  ): Promise<EventAnswer> {
    const at = new Date(`${this.#day}T${time}:00.000Z`);
    const scope = { workshop_id: this.workshop_id, user_id: null };
    const { answer } = await this.db.inScope(scope, (tx) =>
      recordEvent(tx, EVENTS[name], {
        body,
        key: randomUUID(),
        by: this.person(who),
        at,
        ...(approved_by === undefined ? {} : { approved_by: this.person(approved_by).person_id }),
      }),
    );
    return answer;
  }

  /** The id that an act opened, by the field of its detail. */
  async opened(answer: EventAnswer, field: 'account_id' | 'party_id' | 'job_id'): Promise<string> {
    const scope = { workshop_id: this.workshop_id, user_id: null };
    const row = await this.db.inScope(scope, (tx) =>
      tx.one(
        z.object({ id: z.string() }),
        'SELECT detail->>$2 AS id FROM record WHERE workshop_id = current_workshop() AND id = $1::uuid',
        [answer.records[0]?.id ?? '', field],
      ),
    );
    return row.id;
  }
}
