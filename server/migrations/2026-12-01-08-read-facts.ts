/**
 * `read_facts`: the part of the book that an event is decided on, in one call; `open_event`: the same under the
 * workshop's lock, after the request key was taken. Both give JSON as `shared/schemas/facts.ts` reads it.
 */
import type { Migration } from './migration.ts';

const MASSES = ['gross', 'gold', 'silver', 'platinum', 'palladium'] as const;
const masses = (alias: string) => MASSES.map((m) => `'${m}_g', grams(${alias}.${m}_ug)`).join(', ');
const ids = (name: string) =>
  `ARRAY(SELECT jsonb_array_elements_text(coalesce(needed->'${name}', '[]'))::uuid)`;
const list = (select: string) => `coalesce((SELECT jsonb_agg(x.row) FROM (${select}) x), '[]')`;

export const readFacts: Migration = {
  name: '2026-12-01-08-read-facts',
  up: `
    CREATE FUNCTION grams(ug bigint) RETURNS text LANGUAGE sql IMMUTABLE AS
      $$ SELECT round(ug::numeric / 1000000, 6)::text $$;

    -- A table named record can't be a parameter's type (it is a word of SQL's own), so its columns come one by one.
    CREATE FUNCTION entry_json(e entry, id uuid, kind text, operation text, bench uuid) RETURNS jsonb LANGUAGE sql STABLE AS $$
      SELECT jsonb_build_object('voucher_id', id, 'voucher_sequence', e.voucher_sequence::text, 'voucher_kind', kind,
        'business_date', e.business_date::text, 'line', e.line::text, 'operation', operation, 'bench', bench,
        'account_id', e.account_id, 'lot_id', e.lot_id, ${masses('e')}, 'pieces', e.pieces::text,
        'corrects', (SELECT c.detail->>'corrects' FROM record c WHERE c.workshop_id = e.workshop_id AND c.id = entry_json.id),
        'reversed_by', (SELECT v.id FROM record v WHERE v.workshop_id = e.workshop_id AND v.reverses = entry_json.id)) $$;

    -- Loss booked by what feeds a bin, since that bin was last swept up; never the loss account's balance.
    CREATE FUNCTION unswept_loss(w uuid, bins uuid[]) RETURNS jsonb LANGUAGE sql STABLE AS $$
      SELECT ${list(`
        SELECT jsonb_build_object('bin_id', f.bin_id, 'operation', f.operation, 'bench_id', f.bench_id,
          'loss', jsonb_build_object(${MASSES.map((m) => `'${m}_g', grams(coalesce(sum(e.${m}_ug), 0)::bigint)`).join(', ')})) AS row
        FROM (
          SELECT (s.detail->>'bin_id')::uuid AS bin_id, s.detail->>'operation' AS operation, (s.detail->>'bench_id')::uuid AS bench_id,
            coalesce((SELECT max(r.sequence) FROM record r WHERE r.workshop_id = w AND r.kind = 'sweep_up'
              AND r.detail->>'bin_id' = s.detail->>'bin_id'
              AND NOT EXISTS (SELECT 1 FROM record v WHERE v.workshop_id = w AND v.reverses = r.id)), 0) AS since
          FROM setting s WHERE s.workshop_id = w AND s.name LIKE 'bin:%' AND (s.detail->>'bin_id')::uuid = ANY (bins)
        ) f
        JOIN account a ON a.workshop_id = w AND a.kind = 'working_loss' AND a.operation = f.operation
        LEFT JOIN (entry e JOIN record r ON r.workshop_id = e.workshop_id AND r.sequence = e.voucher_sequence
            LEFT JOIN record first ON first.workshop_id = r.workshop_id AND first.id = r.reverses)
          ON e.workshop_id = w AND e.account_id = a.id AND e.voucher_sequence > f.since
            AND (f.bench_id IS NULL OR coalesce(r.bench, first.bench) = f.bench_id)
            AND coalesce(first.kind, r.kind) NOT IN ('sweep_up', 'outturn', 'write_off')
        GROUP BY f.bin_id, f.operation, f.bench_id`)} $$;

    CREATE FUNCTION read_facts(needed jsonb, p_now timestamptz DEFAULT NULL) RETURNS jsonb LANGUAGE plpgsql STABLE
      SET plan_cache_mode = force_generic_plan AS $$
    DECLARE
      w uuid := current_workshop();
      v_vouchers uuid[] := ${ids('voucher_ids')} || ${ids('trace_voucher_ids')};
      traced uuid[]; full_lots uuid[]; history uuid[]; held holding[]; by_job job_holding[]; past entry[];
      v_accounts uuid[]; v_lots uuid[]; v_jobs uuid[]; v_parties uuid[];
    BEGIN
      SELECT array_agg(DISTINCT e.lot_id) INTO traced FROM record r
        JOIN entry e ON e.workshop_id = w AND e.voucher_sequence = r.sequence
        WHERE r.workshop_id = w AND r.id = ANY (${ids('trace_voucher_ids')});
      full_lots := ${ids('lot_ids')} || coalesce(traced, '{}');
      history := ${ids('history_lot_ids')} || coalesce(traced, '{}');
      SELECT array_agg(h) INTO held FROM (
        SELECT h.* FROM holding h WHERE h.workshop_id = w AND h.lot_id = ANY (full_lots)
        UNION
        SELECT h.* FROM holding h WHERE h.workshop_id = w AND h.account_id = ANY (${ids('place_ids')})
          AND (NOT h.in_place OR h.gross_ug <> 0 OR h.gold_ug <> 0 OR h.silver_ug <> 0 OR h.platinum_ug <> 0 OR h.palladium_ug <> 0)
      ) h;
      SELECT array_agg(j) INTO by_job FROM job_holding j WHERE j.workshop_id = w AND j.account_id = ANY (${ids('place_ids')})
        AND (j.gross_ug <> 0 OR j.gold_ug <> 0 OR j.silver_ug <> 0 OR j.platinum_ug <> 0 OR j.palladium_ug <> 0);
      SELECT array_agg(e) INTO past FROM (
        SELECT e.* FROM entry e WHERE e.workshop_id = w AND e.lot_id = ANY (history)
        UNION
        SELECT e.* FROM record r JOIN entry e ON e.workshop_id = w AND e.voucher_sequence = r.sequence
          WHERE r.workshop_id = w AND r.id = ANY (v_vouchers)
      ) e;
      v_accounts := ${ids('account_ids')} || ${ids('place_ids')}
        || ARRAY(SELECT h.account_id FROM unnest(held) h) || ARRAY(SELECT e.account_id FROM unnest(past) e);
      v_lots := full_lots || history || ARRAY(SELECT h.lot_id FROM unnest(held) h) || ARRAY(SELECT e.lot_id FROM unnest(past) e)
        || ARRAY(SELECT j.lot_id FROM unnest(by_job) j);
      v_jobs := ${ids('job_ids')} || ARRAY(SELECT DISTINCT j.job_id FROM unnest(by_job) j);
      v_parties := ${ids('party_ids')}
        || ARRAY(SELECT l.owner_id FROM lot l WHERE l.workshop_id = w AND l.id = ANY (v_lots) AND l.owner_id IS NOT NULL)
        || ARRAY(SELECT j.customer_id FROM job j WHERE j.workshop_id = w AND j.id = ANY (v_jobs) AND j.customer_id IS NOT NULL);
      RETURN jsonb_build_object(
        'today', (SELECT (coalesce(p_now, clock_timestamp()) AT TIME ZONE s.time_zone)::date::text FROM workshop s WHERE s.workshop_id = w),
        'closed_through', (SELECT max(p.last_day)::text FROM period p WHERE p.workshop_id = w AND p.closed),
        'periods', ${list(`
          SELECT jsonb_build_object('id', p.id, 'first_day', p.first_day::text, 'last_day', p.last_day::text, 'closed', p.closed) AS row
          FROM period p WHERE p.workshop_id = w ORDER BY p.first_day`)},
        'lot_serial', (SELECT h.lot_serial::text FROM workshop_head h WHERE h.workshop_id = w),
        'currency', (SELECT s.currency FROM workshop s WHERE s.workshop_id = w),
        'time_zone', (SELECT s.time_zone FROM workshop s WHERE s.workshop_id = w),
        'accounts', ${list(`
          SELECT jsonb_build_object('id', a.id, 'kind', a.kind, 'name', a.name, 'custodian_id', a.custodian_id,
            'party_id', a.party_id, 'operation', a.operation, 'closed', a.closed) AS row
          FROM account a WHERE a.workshop_id = w AND (a.id = ANY (v_accounts) OR a.party_id = ANY (v_parties)
            OR a.kind IN ('sold', 'opening_stock', 'working_loss', 'count_variance', 'assay_variance', 'processors_deduction',
              'used_up', 'written_off', 'foreign_matter'))`)},
        'lots', ${list(`
          SELECT jsonb_build_object('id', l.id, 'code', l.code, 'form', l.form, 'alloy', l.alloy, 'owner_id', l.owner_id,
            'origin', l.origin, 'gold_permille', trim_scale(l.gold_permille)::text, 'silver_permille', trim_scale(l.silver_permille)::text,
            'platinum_permille', trim_scale(l.platinum_permille)::text, 'palladium_permille', trim_scale(l.palladium_permille)::text,
            'basis', l.basis, 'standing', l.standing, 'hold_reason', l.hold_reason, 'hold_until', l.hold_until::text,
            'description', l.description) AS row
          FROM lot l WHERE l.workshop_id = w AND l.id = ANY (v_lots)`)},
        'holdings', ${list(`
          SELECT jsonb_build_object('account_id', h.account_id, 'lot_id', h.lot_id, ${masses('h')}, 'pieces', h.pieces::text) AS row
          FROM unnest(held) h`)},
        'job_holdings', ${list(`
          SELECT jsonb_build_object('account_id', j.account_id, 'lot_id', j.lot_id,
            'job_id', nullif(j.job_id, '00000000-0000-0000-0000-000000000000'), ${masses('j')}, 'pieces', j.pieces::text,
            'came_by', (SELECT jsonb_build_object('kind', r.kind, 'operation', r.operation)
              FROM entry e JOIN record r ON r.workshop_id = w AND r.sequence = e.voucher_sequence
              WHERE e.workshop_id = w AND e.account_id = j.account_id AND e.lot_id = j.lot_id AND e.gross_ug > 0
                AND coalesce(r.job_id, '00000000-0000-0000-0000-000000000000') = j.job_id
                AND r.kind NOT IN ('reversal', 'correction')
                AND NOT EXISTS (SELECT 1 FROM record v WHERE v.workshop_id = w AND v.reverses = r.id)
              ORDER BY e.voucher_sequence DESC LIMIT 1)) AS row
          FROM unnest(by_job) j`)},
        'lot_entries', ${list(`
          SELECT entry_json(e, r.id, r.kind, r.operation, r.bench) AS row FROM unnest(past) e JOIN record r ON r.workshop_id = w AND r.sequence = e.voucher_sequence
          WHERE e.lot_id = ANY (history) ORDER BY e.voucher_sequence, e.line`)},
        'vouchers', ${list(`
          SELECT jsonb_build_object('id', r.id, 'sequence', r.sequence::text, 'kind', r.kind, 'business_date', r.business_date::text,
            'recorded_by', r.recorded_by, 'approved_by', r.approved_by, 'reverses', r.reverses,
            'reversed_by', (SELECT v.id FROM record v WHERE v.workshop_id = w AND v.reverses = r.id), 'note', r.note, 'detail', r.detail,
            'entries', (SELECT coalesce(jsonb_agg(entry_json(e, r.id, r.kind, r.operation, r.bench) ORDER BY e.line), '[]') FROM unnest(past) e WHERE e.voucher_sequence = r.sequence)) AS row
          FROM record r WHERE r.workshop_id = w AND r.id = ANY (v_vouchers)`)},
        'handovers', ${list(`
          SELECT jsonb_build_object('id', h.id, 'voucher_id', h.voucher_id, 'place_id', h.place_id,
            'from_person_id', h.from_person_id, 'to_person_id', h.to_person_id, 'state', h.state) AS row
          FROM handover h WHERE h.workshop_id = w AND h.voucher_id = ANY (v_vouchers)`)},
        'documents', ${list(`
          SELECT jsonb_build_object('id', o.id, 'sha256', o.sha256) AS row
          FROM document o WHERE o.workshop_id = w AND o.id = ANY (${ids('document_ids')})`)},
        'parties', ${list(`
          SELECT jsonb_build_object('id', p.id, 'kind', p.kind, 'name', p.name) AS row
          FROM party p WHERE p.workshop_id = w AND (p.id = ANY (v_parties)
            OR p.id IN (SELECT a.party_id FROM account a WHERE a.workshop_id = w AND a.id = ANY (v_accounts)))`)},
        'jobs', ${list(`
          SELECT jsonb_build_object('id', j.id, 'code', j.code, 'title', j.title, 'customer_id', j.customer_id) AS row
          FROM job j WHERE j.workshop_id = w AND j.id = ANY (v_jobs)`)},
        'people', ${list(`
          SELECT jsonb_build_object('id', p.id, 'name', p.name, 'role', p.role, 'active', p.active) AS row
          FROM person p WHERE p.workshop_id = w`)},
        'allowances', ${list(`
          SELECT jsonb_build_object('operation', a.operation, 'alloy', a.alloy, 'percent', trim_scale(a.percent)::text,
            'fixed_g', grams(a.fixed_ug), 'from', a.from_date::text) AS row
          FROM allowance a WHERE a.workshop_id = w ORDER BY a.sequence`)},
        'settings', ${list(`SELECT s.detail AS row FROM setting s WHERE s.workshop_id = w ORDER BY s.name`)},
        'unswept', unswept_loss(w, ${ids('bin_ids')}),
        'prices', ${list(`
          SELECT DISTINCT ON (p.metal) jsonb_build_object('metal', p.metal, 'currency', p.currency, 'price_per_ozt', trim_scale(p.price_per_ozt)::text,
            'priced_on', p.priced_on::text, 'source', p.source) AS row
          FROM price p JOIN workshop s ON s.workshop_id = p.workshop_id AND s.currency = p.currency
          WHERE p.workshop_id = w AND p.priced_on <= coalesce(p_now, clock_timestamp())::date + 1 ORDER BY p.metal, p.priced_on DESC, p.sequence DESC`)}
      );
    END $$;

    -- Takes the request key, then the workshop's lock, then reads: what is read can't change before it is posted.
    CREATE FUNCTION open_event(p_key text, p_person uuid, p_body_sha256 text, needed jsonb, p_now timestamptz DEFAULT NULL)
      RETURNS jsonb LANGUAGE plpgsql AS $$
    DECLARE w uuid := current_workshop(); before request_key;
    BEGIN
      INSERT INTO request_key (workshop_id, key, person_id, body_sha256) VALUES (w, p_key, p_person, p_body_sha256)
        ON CONFLICT DO NOTHING;
      IF NOT FOUND THEN
        SELECT * INTO STRICT before FROM request_key WHERE workshop_id = w AND key = p_key;
        IF before.body_sha256 <> p_body_sha256 OR before.person_id <> p_person THEN RETURN '{"state":"other_body"}'; END IF;
        RETURN jsonb_build_object('state', 'answered', 'status', before.status, 'answer', before.answer);
      END IF;
      PERFORM lock_head();
      RETURN jsonb_build_object('state', 'new', 'facts', read_facts(needed, p_now));
    END $$;

    CREATE FUNCTION lock_head() RETURNS void LANGUAGE sql SECURITY DEFINER SET search_path = public, pg_temp AS
      $$ SELECT 1 FROM workshop_head WHERE workshop_id = current_workshop() FOR UPDATE $$;
    REVOKE EXECUTE ON FUNCTION lock_head FROM PUBLIC;
    GRANT EXECUTE ON FUNCTION lock_head TO grainward_app;
  `,
  down: null,
};
