/**
 * `post_records`: the only writer of the book. It locks the workshop's head, gives each record its sequence, time and
 * previous hash, hashes the exact line, and takes the entries from that line, so that what was hashed and what is
 * stored can't differ. All rules of the book hold here or in the constraints of the tables.
 */
import type { Migration } from './migration.ts';

const MASSES = ['gross', 'gold', 'silver', 'platinum', 'palladium'] as const;
const columns = MASSES.map((m) => `${m}_ug`).join(', ');
const each = (make: (mass: string) => string, glue = ', ') => MASSES.map(make).join(glue);

export const postRecords: Migration = {
  name: '2026-12-01-05-post-records',
  up: `
    -- The whole day's closing must hold too: a voucher dated back may not take what a later day's closing has counted.
    CREATE FUNCTION check_day_closings(w uuid, n bigint, on_day date) RETURNS void
      LANGUAGE plpgsql SET search_path = public, pg_temp AS $$
    DECLARE taken record; last_short date; earliest date;
    BEGIN
      FOR taken IN
        SELECT DISTINCT e.account_id, e.lot_id FROM entry e JOIN account a ON a.workshop_id = w AND a.id = e.account_id
        WHERE e.workshop_id = w AND e.voucher_sequence = n AND is_place(a.kind) AND (${each((m) => `e.${m}_ug < 0`, ' OR ')})
          AND EXISTS (SELECT 1 FROM entry later WHERE later.workshop_id = w AND later.account_id = e.account_id
            AND later.lot_id = e.lot_id AND later.business_date > on_day)
      LOOP
        SELECT max(business_date) INTO last_short FROM (
          SELECT business_date, ${each((m) => `sum(sum(${m}_ug)) OVER (ORDER BY business_date) AS ${m}`)}
          FROM entry WHERE workshop_id = w AND account_id = taken.account_id AND lot_id = taken.lot_id GROUP BY business_date
        ) closing WHERE business_date >= on_day AND (${each((m) => `${m} < 0`, ' OR ')});
        IF last_short IS NOT NULL THEN
          SELECT min(business_date) INTO earliest FROM entry
            WHERE workshop_id = w AND account_id = taken.account_id AND lot_id = taken.lot_id AND business_date > last_short;
          RAISE EXCEPTION 'a day''s closing would fall below nothing' USING ERRCODE = 'GW003',
            DETAIL = jsonb_build_object('account_id', taken.account_id, 'lot_id', taken.lot_id, 'earliest', earliest)::text;
        END IF;
      END LOOP;
    END $$;

    CREATE FUNCTION apply_entries(w uuid, n bigint, job uuid, kept uuid[]) RETURNS void
      LANGUAGE plpgsql SET search_path = public, pg_temp AS $$
    BEGIN
      -- UPDATE first, then INSERT what is missing: an upsert would trip the check on the proposed row.
      WITH change AS (
        SELECT account_id, lot_id, ${each((m) => `sum(${m}_ug)::bigint AS ${m}_ug`)}, sum(pieces)::bigint AS pieces
        FROM entry WHERE workshop_id = w AND voucher_sequence = n GROUP BY account_id, lot_id ORDER BY account_id, lot_id
      ), changed AS (
        UPDATE holding h SET ${each((m) => `${m}_ug = h.${m}_ug + c.${m}_ug`)},
          pieces = CASE WHEN h.pieces IS NULL AND c.pieces IS NULL THEN NULL ELSE coalesce(h.pieces, 0) + coalesce(c.pieces, 0) END
        FROM change c WHERE h.workshop_id = w AND h.account_id = c.account_id AND h.lot_id = c.lot_id
        RETURNING h.account_id, h.lot_id
      )
      INSERT INTO holding (workshop_id, account_id, lot_id, in_place, ${columns}, pieces)
      SELECT w, c.account_id, c.lot_id, is_place(a.kind), ${each((m) => `c.${m}_ug`)}, c.pieces
      FROM change c JOIN account a ON a.workshop_id = w AND a.id = c.account_id
      WHERE NOT EXISTS (SELECT 1 FROM changed d WHERE d.account_id = c.account_id AND d.lot_id = c.lot_id);

      INSERT INTO job_holding AS j (workshop_id, account_id, lot_id, job_id, ${columns}, pieces)
      SELECT w, e.account_id, e.lot_id,
        CASE WHEN job IS NULL OR e.lot_id = ANY (kept) THEN '00000000-0000-0000-0000-000000000000' ELSE job END,
        ${each((m) => `sum(e.${m}_ug)::bigint`)}, sum(e.pieces)::bigint
      FROM entry e JOIN account a ON a.workshop_id = w AND a.id = e.account_id AND a.kind IN ('bench', 'station', 'outworker')
      WHERE e.workshop_id = w AND e.voucher_sequence = n GROUP BY e.account_id, e.lot_id
      ON CONFLICT (workshop_id, account_id, lot_id, job_id) DO UPDATE SET
        ${each((m) => `${m}_ug = j.${m}_ug + excluded.${m}_ug`)},
        pieces = CASE WHEN j.pieces IS NULL AND excluded.pieces IS NULL THEN NULL ELSE coalesce(j.pieces, 0) + coalesce(excluded.pieces, 0) END;
    END $$;

    CREATE FUNCTION check_mirror(w uuid, n bigint, reversed uuid) RETURNS void
      LANGUAGE plpgsql SET search_path = public, pg_temp AS $$
    DECLARE first_n bigint;
    BEGIN
      SELECT sequence INTO first_n FROM record WHERE workshop_id = w AND id = reversed AND is_voucher_kind(kind) AND kind <> 'reversal';
      IF first_n IS NULL OR EXISTS (
        (SELECT account_id, lot_id, ${columns}, pieces FROM entry WHERE workshop_id = w AND voucher_sequence = n
         EXCEPT ALL
         SELECT account_id, lot_id, ${each((m) => `-${m}_ug`)}, -pieces FROM entry WHERE workshop_id = w AND voucher_sequence = first_n)
        UNION ALL
        (SELECT account_id, lot_id, ${each((m) => `-${m}_ug`)}, -pieces FROM entry WHERE workshop_id = w AND voucher_sequence = first_n
         EXCEPT ALL
         SELECT account_id, lot_id, ${columns}, pieces FROM entry WHERE workshop_id = w AND voucher_sequence = n)
      ) THEN
        RAISE EXCEPTION 'a reversal is the exact mirror of a voucher' USING ERRCODE = 'GW004';
      END IF;
    END $$;

    -- p_records: [{head, middle}], the line's parts as shared/chain/record-line.ts makes them.
    -- p_handovers: [{id, voucher_id, place_id, from_person_id, to_person_id}]. p_at: a seed's own time (owner only).
    CREATE FUNCTION post_records(p_records jsonb, p_handovers jsonb DEFAULT '[]', p_at timestamptz DEFAULT NULL)
      RETURNS jsonb LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp SET plan_cache_mode = force_generic_plan AS $$
    DECLARE
      w uuid := current_workshop(); n bigint; prior char(64); moment timestamptz; stamp text; part jsonb; whole text; d jsonb;
      k text; on_day date; job uuid; digest char(64); answer jsonb := '[]';
    BEGIN
      IF p_at IS NOT NULL AND session_user <> current_user THEN
        RAISE EXCEPTION 'only a seed run by the owner hands in its own time' USING ERRCODE = 'GW007';
      END IF;
      SELECT sequence, hash, last_recorded_at INTO STRICT n, prior, moment FROM workshop_head WHERE workshop_id = w FOR UPDATE;
      moment := greatest(date_trunc('milliseconds', coalesce(p_at, clock_timestamp())), moment);
      stamp := to_char(moment AT TIME ZONE 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"');
      FOR part IN SELECT value FROM jsonb_array_elements(p_records) LOOP
        n := n + 1;
        whole := (part->>'head') || '"previous_hash":"' || prior || '","recorded_at":"' || stamp || '",' || (part->>'middle')
          || '"sequence":"' || n || '"}';
        d := whole::jsonb;
        -- Thirteen keys, each once: a key that stands twice would be read as one thing and hashed as another.
        IF (SELECT count(*) <> 13 OR count(DISTINCT x.name) <> 13 FROM json_object_keys(whole::json) AS x(name)) OR d->>'previous_hash' <> prior
          OR d->>'sequence' <> n::text OR d->>'recorded_at' <> stamp THEN
          RAISE EXCEPTION 'the parts of a record do not make its line' USING ERRCODE = 'GW005';
        END IF;
        k := d->>'kind'; on_day := (d->>'business_date')::date; job := (d->'detail'->>'job_id')::uuid;
        IF EXISTS (SELECT 1 FROM period WHERE workshop_id = w AND closed AND on_day BETWEEN first_day AND last_day) THEN
          RAISE EXCEPTION 'the period is closed' USING ERRCODE = 'GW008';
        END IF;
        digest := encode(sha256(convert_to(whole, 'UTF8')), 'hex');
        IF is_act_kind(k) THEN PERFORM project_act(w, n, k, d->'detail', on_day, moment); END IF;
        INSERT INTO record (workshop_id, sequence, id, kind, business_date, recorded_at, recorded_by, approved_by, reverses, note,
            detail, documents, operation, bench, person_id, job_id, counterparty_id, line, previous_hash, hash)
          VALUES (w, n, (d->>'id')::uuid, k, on_day, moment, (d->>'recorded_by')::uuid, (d->>'approved_by')::uuid, (d->>'reverses')::uuid,
            d->>'note', d->'detail', d->'documents', d->'detail'->>'operation', (d->'detail'->>'bench')::uuid,
            (d->'detail'->>'person_id')::uuid, job, (d->'detail'->>'counterparty_id')::uuid, whole, prior, digest);
        IF is_voucher_kind(k) THEN
          INSERT INTO entry (workshop_id, voucher_sequence, line, account_id, lot_id, business_date, ${columns}, pieces)
          SELECT w, n, (e->>'line')::integer, (e->>'account_id')::uuid, (e->>'lot_id')::uuid, on_day,
            ${each((m) => `((e->>'${m}_g')::numeric * 1000000)::bigint`)}, (e->>'pieces')::bigint
          FROM jsonb_array_elements(d->'entries') e;
          IF NOT FOUND THEN
            RAISE EXCEPTION 'a voucher has two entries or more and sums to zero in all five masses' USING ERRCODE = 'GW001';
          END IF;
          -- Stock that a bench keeps for several jobs leaves the share that lies there for none of them.
          PERFORM apply_entries(w, n, job,
            ARRAY(SELECT (k.value->>'lot_id')::uuid FROM jsonb_array_elements(coalesce(d->'detail'->'kept', '[]')) k));
          PERFORM check_day_closings(w, n, on_day);
          IF k = 'reversal' THEN PERFORM check_mirror(w, n, (d->>'reverses')::uuid); END IF;
        ELSIF d->'entries' <> '[]'::jsonb THEN
          RAISE EXCEPTION 'an act has no entries' USING ERRCODE = 'GW001';
        END IF;
        answer := answer || jsonb_build_object('id', d->>'id', 'kind', k, 'sequence', n::text, 'recorded_at', stamp, 'hash', digest);
        prior := digest;
      END LOOP;
      UPDATE workshop_head SET sequence = n, hash = prior, last_recorded_at = moment WHERE workshop_id = w;
      INSERT INTO handover (workshop_id, id, voucher_id, place_id, from_person_id, to_person_id)
        SELECT w, (h->>'id')::uuid, (h->>'voucher_id')::uuid, (h->>'place_id')::uuid, (h->>'from_person_id')::uuid, (h->>'to_person_id')::uuid
        FROM jsonb_array_elements(p_handovers) h;
      RETURN answer;
    END $$;

    REVOKE EXECUTE ON FUNCTION post_records, project_act, apply_entries, check_mirror, check_day_closings FROM PUBLIC;
    GRANT EXECUTE ON FUNCTION post_records TO grainward_app;
  `,
  down: null,
};
