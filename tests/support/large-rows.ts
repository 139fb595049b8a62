import { makers, models, streets, towns } from "@/db/seed/names";

/**
 * Rows of many shops, made inside the database. Everything is invented. Rows are written in the order in which
 * time would have written them, the shops in turn: a shop's rows lie scattered over the whole table, which is
 * the hardest case for reading one shop.
 */
const size = {
  shops: 20,
  customers: 2_000,
  sites: 2_500,
  instruments: 5_000,
  visits: 5_000,
  /** Instruments of each shop's first customer, all at its first site: a conservatory. */
  conservatory: 300,
  /** Sheets of each shop's first instrument beside those of visits. */
  sheetsOfFirst: 150,
} as const;

const words = (list: readonly string[]) =>
  `array[${list.map((word) => `'${word.replaceAll("'", "''")}'`).join(", ")}]`;
const oneOf = (list: readonly string[], number: string) =>
  `(${words(list)})[1 + (${number}) % ${list.length}]`;

const given =
  "Ada Bram Celia Dorian Elin Farid Greta Hugo Iris Jonah Katya Lennart Mirela Nils Odile Pavel".split(" ");
const family = ["Ash", "Birk", "Corr", "Dell", "Elm", "Fenn", "Gorse", "Holm", "Iver", "Juniper", "Kestrel"];
const endings = [
  "",
  "ander",
  "by",
  "combe",
  "dottir",
  "feld",
  "gard",
  "horst",
  "ling",
  "mere",
  "quist",
  "wick",
];
const pianos = makers.flatMap((maker) =>
  [...models[maker].grand, ...models[maker].upright].map((model) => `${maker}|${model}`),
);
const cities = [...towns.map(({ city }) => city), "Little Fenwick", "Kelsay", "Ormsby Cross", "Tarn Quay"];

const each = (rows: number) => `generate_series(1, ${rows}) n, generate_series(1, ${size.shops}) s`;
const zone = "'Europe/Dublin'";
/** A number without pattern, the same in every run. */
const chance = (salt: string) => `(hashint8(n * 1000 + s + hashtext('${salt}')::bigint) & 1048575)`;

export const preparation = `
  -- As the product's own ids: they sort by the time of creation, whatever the shop.
  create function pg_temp.made_id(kind text, s int, n int) returns uuid language sql immutable as $$
    select (lpad(to_hex(1700000000000 + n * 60000::bigint), 12, '0') || '7' || lpad(to_hex(s), 3, '0')
      || '8' || lpad(to_hex(hashtext(kind)), 15, '0'))::uuid
  $$;
  -- Which instrument stands where: the first ones in the conservatory, the others about the town.
  create temp table standing as
    select s, n, case when n <= ${size.conservatory} then 1 else 2 + ${chance("site")} % ${size.sites - 1} end as site
      from ${each(size.instruments)};
  create temp table appointment as
    select s, n, 1 + ${chance("visit")} % ${size.instruments} as instrument from ${each(size.visits)};
  analyze standing;
  analyze appointment;`;

export const rows = [
  `insert into shop (id, name, time_zone, country, currency)
    select pg_temp.made_id('shop', s, 0), 'Shop ' || s, ${zone}, 'IE', 'EUR' from generate_series(1, ${size.shops}) s`,

  `insert into customer (shop_id, id, kind, name, contact_name, email, phone, archived_at, created_at, updated_at)
    select pg_temp.made_id('shop', s, 0), pg_temp.made_id('customer', s, n),
      case when n % 10 = 1 then 'organisation' else 'person' end::customer_kind,
      case when n = 1 then 'Averil Conservatory' else ${oneOf(given, chance("given"))} || ' '
        || ${oneOf(family, chance("family"))} || ${oneOf(endings, chance("ending"))} end,
      case when n % 10 = 1 then ${oneOf(given, chance("contact"))} end,
      'c' || n || '@shop' || s || '.example', '+353 71 ' || lpad((${chance("phone")})::text, 7, '0'),
      case when n % 33 = 0 then now() end, at, at
    from ${each(size.customers)}, lateral (select now() - make_interval(mins => ${chance("customer age")})) t(at)
    order by n, s`,

  `insert into site (shop_id, id, customer_id, name, street, postal_code, city, country, time_zone, archived_at, created_at, updated_at)
    select pg_temp.made_id('shop', s, 0), pg_temp.made_id('site', s, n),
      pg_temp.made_id('customer', s, 1 + (n - 1) % ${size.customers}),
      case when n = 1 then 'Main building' else 'House ' || n end,
      ${chance("house")} % 200 || ' ' || ${oneOf(streets, chance("street"))}, 'F' || ${chance("postal code")} % 90000,
      ${oneOf(cities, chance("city"))}, 'IE', ${zone}, case when n % 33 = 0 then now() end, at, at
    from ${each(size.sites)}, lateral (select now() - make_interval(mins => ${chance("site age")})) t(at)
    order by n, s`,

  `insert into member (shop_id, id, person_id, role, name, email, customer_id, bookable)
    select pg_temp.made_id('shop', s, 0), pg_temp.made_id('member', s, n), pg_temp.made_id('person', s, n),
      r::role, r || ' ' || n, 'm' || n || '@shop' || s || '.example',
      case when r = 'customer' then pg_temp.made_id('customer', s, n - 6) end, r = 'technician'
    from generate_series(1, ${size.shops}) s,
      unnest('{owner,office,technician,technician,technician,technician,customer,customer}'::text[]) with ordinality m(r, k),
      lateral (select k::int) i(n)`,

  `insert into instrument (shop_id, id, maker, model, serial, year, kind, room, archived_at, created_at, updated_at)
    select pg_temp.made_id('shop', s, 0), pg_temp.made_id('instrument', s, n), split_part(piano, '|', 1), split_part(piano, '|', 2),
      'B-' || lpad((${chance("serial")} % 900000)::text, 6, '0'), 1900 + n % 120,
      case when n % 3 = 0 then 'grand' else 'upright' end::instrument_kind,
      case when n <= ${size.conservatory} then 'Room ' || n else '' end, case when n % 33 = 0 then now() end, at, at
    from ${each(size.instruments)},
      lateral (select now() - make_interval(mins => ${chance("instrument age")}), ${oneOf(pianos, chance("piano"))}) t(at, piano)
    order by n, s`,

  `insert into instrument_holding (shop_id, id, instrument_id, site_id, owner_id, since, until)
    select pg_temp.made_id('shop', s, 0), pg_temp.made_id('holding' || e.era, s, n), pg_temp.made_id('instrument', s, n),
      pg_temp.made_id('site', s, h.site), pg_temp.made_id('customer', s, 1 + (h.site - 1) % ${size.customers}),
      case when e.era = 1 then date '2012-01-01' else date '2019-01-01' end, case when e.era = 1 then date '2019-01-01' end
    from standing w join generate_series(1, 2) e(era) on e.era = 2 or n % 20 = 0,
      lateral (select case when e.era = 1 then 1 + n % ${size.sites} else w.site end) h(site)
    order by n, s`,

  `insert into service_plan (shop_id, instrument_id, rhythm, every, unit, months, starts_on)
    select pg_temp.made_id('shop', s, 0), pg_temp.made_id('instrument', s, n),
      case when n % 3 = 0 then 'months' else 'interval' end::rhythm_kind, 6, 'month', '{4,10}', current_date - 600
    from ${each(size.instruments)} order by n, s`,

  `insert into visit (shop_id, id, site_id, customer_id, state, starts_local, ends_local, time_zone, during)
    select pg_temp.made_id('shop', t.s, 0), pg_temp.made_id('visit', t.s, t.n), pg_temp.made_id('site', t.s, w.site),
      pg_temp.made_id('customer', t.s, 1 + (w.site - 1) % ${size.customers}),
      case when t.starts > localtimestamp then case when t.n % 7 = 0 then 'offered' else 'confirmed' end
        when t.n % 40 = 0 then 'cancelled' when t.n % 41 = 0 then 'done' else 'closed' end::visit_state,
      t.starts, t.starts + interval '90 minutes', ${zone},
      tstzrange(t.starts at time zone ${zone}, (t.starts + interval '90 minutes') at time zone ${zone}, '[)')
    from appointment a join standing w on w.s = a.s and w.n = a.instrument, lateral (
      -- Four technicians, each twice a day.
      select a.n, a.s, (current_date - 600 + a.n / 8) + make_interval(hours => 9 + 4 * (a.n / 4 % 2))) t(n, s, starts)
    order by t.n, t.s`,

  `insert into visit_technician (shop_id, visit_id, member_id, during, live)
    select v.shop_id, v.id, pg_temp.made_id('member', s, 3 + n % 4), v.during, visit_is_live(v.state)
    from appointment a join visit v on v.shop_id = pg_temp.made_id('shop', s, 0) and v.id = pg_temp.made_id('visit', s, n)
    order by n, s`,

  `insert into visit_event (shop_id, id, visit_id, from_state, to_state, by_member_id)
    select pg_temp.made_id('shop', s, 0), pg_temp.made_id('event', s, n), pg_temp.made_id('visit', s, n), null, 'confirmed',
      pg_temp.made_id('member', s, 2)
    from ${each(size.visits)} where n % 10 = 0 order by n, s`,

  `insert into job (shop_id, id, visit_id, instrument_id)
    select pg_temp.made_id('shop', s, 0), pg_temp.made_id('job', s, n), pg_temp.made_id('visit', s, n),
      pg_temp.made_id('instrument', s, instrument)
    from appointment order by n, s`,

  `insert into reading_sheet (shop_id, id, instrument_id, job_id, stage, taken_at, taken_by, reference_hz)
    select pg_temp.made_id('shop', s, 0), pg_temp.made_id('sheet' || stage, s, n), pg_temp.made_id('instrument', s, instrument),
      pg_temp.made_id('job', s, n), stage::stage, current_date - 600 + n / 8 + interval '10 hours' + length(stage) * interval '1 minute',
      pg_temp.made_id('member', s, 3 + n % 4), 440
    from appointment, unnest('{as-found,as-left}'::text[]) as st(stage) where n % 15 = 0
    union all
    select pg_temp.made_id('shop', s, 0), pg_temp.made_id('practice', s, n), pg_temp.made_id('instrument', s, 1), null, 'as-found',
      now() - make_interval(days => n, secs => 0.000123), pg_temp.made_id('member', s, 3), 440
    from ${each(size.sheetsOfFirst)}`,

  `insert into note_reading (shop_id, id, sheet_id, midi, partials, hz, sigma_cents, f1_hz, b, b_sigma, fit, fit_version)
    select r.shop_id, gen_random_uuid(), r.id, midi, '{1,2,3}', array[hz, 2.001 * hz, 3.004 * hz], '{null,null,null}',
      hz, 0.0005, 0.00002, '{}', 1
    from reading_sheet r, unnest('{54,63,69}'::int[]) as m(midi),
      lateral (select 440 * power(2, (midi - 69) / 12.0) * (1 - (hashtext(r.id::text) & 63) / 20000.0)) f(hz)`,
];
