-- What each door may touch. Tables of people and credentials stay shut: the entry functions read them.
grant usage on schema public to clamptide_shop, clamptide_entry, clamptide_relay;
grant execute on function current_shop() to clamptide_shop;

grant select, insert, update, delete on
  shop, shop_counter, station, clamp_class, profile, member, design, route_copy, batch, step_run, board, customer,
  shop_order, order_line, line_batch, plan, forecast, reading, screen, api_key, idempotency_key
to clamptide_shop;
grant select, insert, update on occupation to clamptide_shop;
-- Facts and what must stay for ever are appended.
grant select, insert on event, rework_reason to clamptide_shop;
grant select, insert on hold_override to clamptide_shop;
grant update (seen_at) on hold_override to clamptide_shop;

grant select on event, shop_counter to clamptide_relay;
grant select, insert, update on relay_cursor to clamptide_relay;

create schema entry;
grant usage on schema entry to clamptide_entry;

-- Makes a person, a shop with its settings, and the member who owns it. False when the address is taken.
create function entry.sign_up(
  person_id uuid, email text, password_hash text, shop jsonb, member jsonb, stations jsonb, clamps jsonb, profiles jsonb
) returns boolean
language plpgsql security definer set search_path = public, pg_temp as $$
#variable_conflict use_variable
declare
  new_shop uuid := (shop ->> 'id')::uuid;
begin
  insert into public.person (id, email, password_hash) values (person_id, email, password_hash)
  on conflict do nothing;
  if not found then return false; end if;
  insert into public.shop (id, name, zone, length_unit, currency, weekly, exceptions, skills, route, batch_prefix, demo_made_at)
  values (
    new_shop, shop ->> 'name', shop ->> 'zone', coalesce(shop ->> 'length_unit', 'MILLIMETRE'),
    coalesce(shop ->> 'currency', 'EUR'), shop -> 'weekly', coalesce(shop -> 'exceptions', '[]'), shop -> 'skills',
    shop -> 'route', coalesce(shop ->> 'batch_prefix', 'CT'), (shop ->> 'demo_made_at')::timestamptz
  );
  insert into public.shop_counter (shop_id) values (new_shop);
  insert into public.member (shop_id, id, person_id, name, initials, roles, skills)
  values (
    new_shop, (member ->> 'id')::uuid, person_id, member ->> 'name', member ->> 'initials',
    array(select jsonb_array_elements_text(member -> 'roles')), array(select jsonb_array_elements_text(member -> 'skills'))
  );
  insert into public.station (shop_id, key, name, unit, capacity, position)
  select new_shop, s ->> 'key', s ->> 'name', s ->> 'unit', (s ->> 'capacity')::int, n::int
  from jsonb_array_elements(stations) with ordinality as each (s, n);
  insert into public.clamp_class (shop_id, key, length, count)
  select new_shop, c ->> 'key', (c ->> 'length')::bigint, (c ->> 'count')::int from jsonb_array_elements(clamps) as c;
  insert into public.profile (shop_id, key, kind, usual, figures)
  select new_shop, p -> 'figures' ->> 'key', p -> 'figures' ->> 'kind', (p ->> 'usual')::boolean, p -> 'figures'
  from jsonb_array_elements(profiles) as p;
  return true;
end $$;

-- Makes a person without a shop, for someone who joins one. Null when the address is taken.
create function entry.add_person(person_id uuid, email text, password_hash text) returns boolean
language plpgsql security definer set search_path = public, pg_temp as $$
#variable_conflict use_variable
begin
  insert into public.person (id, email, password_hash) values (person_id, email, password_hash) on conflict do nothing;
  return found;
end $$;

-- Begins an attempt to sign in: how many seconds to wait first, else whose address it is and the hash to compare with,
-- null for an unknown one. Every attempt counts until one works, each from the third on doubles the delay (one second up
-- to five minutes), and addresses that nobody has count the same. Counting comes first, so that attempts at the same
-- moment wait for each other here.
create function entry.begin_sign_in(address text)
returns table (wait_seconds integer, person_id uuid, password_hash text)
language plpgsql security definer set search_path = public, pg_temp as $$
#variable_conflict use_column
declare
  hash text := encode(sha256(convert_to(lower(address), 'UTF8')), 'hex');
begin
  delete from sign_in_failure where address_hash in (
    select old.address_hash from sign_in_failure old where old.last_at < now() - interval '1 hour'
    limit 100 for update skip locked
  );
  insert into sign_in_failure as f (address_hash, failures, last_at) values (hash, 1, now())
  on conflict (address_hash) do update set
    failures = f.failures + 1,
    not_before = case
      when f.failures < 2 then null
      else clock_timestamp() + make_interval(secs => least(300, 2 ^ least(f.failures - 2, 9)))
    end,
    last_at = now()
  where f.not_before is null or f.not_before <= clock_timestamp();
  if found then
    return query
      select 0, p.id, p.password_hash from (select 1) as one left join person p on lower(p.email) = lower(address);
    return;
  end if;
  return query
    select greatest(1, ceil(extract(epoch from f.not_before - clock_timestamp()))::integer), null::uuid, null::text
    from sign_in_failure f where f.address_hash = hash;
end $$;

-- An attempt worked: those before it are forgotten.
create function entry.forget_failures(address text) returns void
language sql security definer set search_path = public, pg_temp as $$
  delete from sign_in_failure where address_hash = encode(sha256(convert_to(lower(address), 'UTF8')), 'hex')
$$;

create function entry.shops_of(person uuid) returns table (shop_id uuid, name text, member_id uuid, roles text[])
language sql stable security definer set search_path = public, pg_temp as $$
  select s.id, s.name, m.id, m.roles from member m join shop s on s.id = m.shop_id
  where m.person_id = person and m.active order by s.name, s.id
$$;

create function entry.open_session(session_id uuid, token_hash text, person uuid, shop uuid, device text) returns void
language sql security definer set search_path = public, pg_temp as $$
  delete from session where person_id = person
    and (last_seen_at < now() - interval '7 days' or created_at < now() - interval '30 days');
  insert into session (id, token_hash, person_id, shop_id, device)
  select session_id, token_hash, person, shop, left(device, 200)
  where exists (select from member m where m.person_id = person and m.shop_id = shop and m.active)
$$;

-- Who a session is: seven days without use or thirty days in all end it. Notes the use, to the minute.
create function entry.session(hash text)
returns table (session_id uuid, person_id uuid, email text, shop_id uuid, member_id uuid, roles text[])
language plpgsql security definer set search_path = public, pg_temp as $$
begin
  update session s set last_seen_at = now() where s.token_hash = hash
    and s.last_seen_at < now() - interval '1 minute'
    and s.last_seen_at > now() - interval '7 days' and s.created_at > now() - interval '30 days';
  return query
    select s.id, s.person_id, p.email, s.shop_id, m.id, m.roles
    from session s join person p on p.id = s.person_id
    join member m on m.shop_id = s.shop_id and m.person_id = s.person_id and m.active
    where s.token_hash = hash
      and s.last_seen_at > now() - interval '7 days' and s.created_at > now() - interval '30 days';
end $$;

create function entry.turn_session(session_id uuid, person uuid, shop uuid) returns boolean
language plpgsql security definer set search_path = public, pg_temp as $$
#variable_conflict use_variable
begin
  update public.session s set shop_id = shop where s.id = session_id and s.person_id = person
    and exists (select from public.member m where m.person_id = person and m.shop_id = shop and m.active);
  return found;
end $$;

create function entry.sessions_of(person uuid)
returns table (session_id uuid, device text, created_at timestamptz, last_seen_at timestamptz)
language sql stable security definer set search_path = public, pg_temp as $$
  select id, device, created_at, last_seen_at from session where person_id = person
    and last_seen_at > now() - interval '7 days' and created_at > now() - interval '30 days'
  order by created_at desc
$$;

-- Ends one session of a person, or all but one. Returns the hashes that are worth nothing any more.
create function entry.end_sessions(person uuid, only_id uuid, but_id uuid) returns table (token_hash text)
language sql security definer set search_path = public, pg_temp as $$
  delete from session s where s.person_id = person
    and (only_id is null or s.id = only_id) and (but_id is null or s.id <> but_id)
  returning s.token_hash
$$;

create function entry.api_key(hash text)
returns table (shop_id uuid, key_id uuid, scopes text[])
language plpgsql security definer set search_path = public, pg_temp as $$
begin
  update api_key k set last_used_at = now() where k.key_hash = hash and k.revoked_at is null
    and (k.last_used_at is null or k.last_used_at < now() - interval '1 minute');
  return query
    select k.shop_id, k.id, k.scopes from api_key k where k.key_hash = hash and k.revoked_at is null
      and (k.expires_at is null or k.expires_at > now());
end $$;

create function entry.screen(screen_id uuid) returns table (shop_id uuid, screen_id_out uuid)
language plpgsql security definer set search_path = public, pg_temp as $$
#variable_conflict use_variable
begin
  update public.screen s set last_seen_at = now() where s.id = screen_id and s.revoked_at is null
    and (s.last_seen_at is null or s.last_seen_at < now() - interval '1 minute');
  return query select s.shop_id, s.id from public.screen s where s.id = screen_id and s.revoked_at is null;
end $$;

-- Notes a display's code. False when the code is taken, so that another is drawn.
create function entry.start_pairing(secret_hash text, code text) returns boolean
language plpgsql security definer set search_path = public, pg_temp as $$
#variable_conflict use_variable
begin
  delete from public.pairing p where p.expires_at < now() - interval '1 hour';
  -- A bound on what strangers can make us keep.
  if (select count(*) from public.pairing) >= 10000 then return false; end if;
  insert into public.pairing (secret_hash, code, expires_at) values (secret_hash, code, now() + interval '10 minutes')
  on conflict do nothing;
  return found;
end $$;

-- What became of a display's code. The screen is named once.
create function entry.poll_pairing(hash text) returns table (state text, shop_id uuid, screen_id uuid)
language plpgsql security definer set search_path = public, pg_temp as $$
begin
  return query
    update pairing p set delivered_at = now()
    where p.secret_hash = hash and p.screen_id is not null and p.delivered_at is null and p.expires_at > now()
    returning 'PAIRED', p.shop_id, p.screen_id;
  if found then return; end if;
  return query
    select 'WAITING', null::uuid, null::uuid from pairing p
    where p.secret_hash = hash and p.screen_id is null and p.expires_at > now();
  if found then return; end if;
  return query select 'EXPIRED', null::uuid, null::uuid;
end $$;

-- A member enters a code: five wrong ones in ten minutes are the limit. OK, WRONG, EXPIRED, USED or TOO_MANY.
create function entry.claim_pairing(code text, shop uuid, member uuid, screen_id uuid, name text) returns text
language plpgsql security definer set search_path = public, pg_temp as $$
#variable_conflict use_variable
declare
  found_pairing public.pairing;
begin
  perform pg_advisory_xact_lock(hashtextextended(member::text, 7));
  delete from public.pairing_attempt a where a.member_id = member and a.at < now() - interval '10 minutes';
  if (select count(*) from public.pairing_attempt a where a.member_id = member) >= 5 then return 'TOO_MANY'; end if;
  select p.* into found_pairing from public.pairing p where p.code = code for update;
  if not found then
    insert into public.pairing_attempt (member_id) values (member);
    return 'WRONG';
  end if;
  if found_pairing.screen_id is not null then
    insert into public.pairing_attempt (member_id) values (member);
    return 'USED';
  end if;
  if found_pairing.expires_at <= now() then
    insert into public.pairing_attempt (member_id) values (member);
    return 'EXPIRED';
  end if;
  update public.pairing p set shop_id = shop, screen_id = screen_id where p.code = code;
  insert into public.screen (shop_id, id, name) values (shop, screen_id, name);
  return 'OK';
end $$;

-- Keys that sign tokens, sealed. The first caller's key stays when two come at once.
create function entry.signing_keys() returns table (id text, sealed text, created_at timestamptz)
language sql stable security definer set search_path = public, pg_temp as $$
  select id, sealed, created_at from signing_key order by created_at desc
$$;
create function entry.add_signing_key(key_id text, key_sealed text) returns void
language sql security definer set search_path = public, pg_temp as $$
  insert into signing_key (id, sealed) values (key_id, key_sealed) on conflict do nothing
$$;

-- The demo shop, to find it again; and its removal, which no real shop can suffer.
create function entry.demo_shop() returns table (shop_id uuid, made_at timestamptz, untouched boolean)
language sql stable security definer set search_path = public, pg_temp as $$
  select s.id, s.demo_made_at, not exists (
    select from event e where e.shop_id = s.id and e.recorded_at > s.demo_made_at + interval '1 minute'
      and e.by is not null
  ) from shop s where s.demo_made_at is not null
$$;
create function entry.remove_demo(shop uuid) returns void
language plpgsql security definer set search_path = public, pg_temp as $$
#variable_conflict use_variable
declare
  people uuid[];
begin
  if not exists (select from public.shop s where s.id = shop and s.demo_made_at is not null) then return; end if;
  select array_agg(m.person_id) into people from public.member m where m.shop_id = shop and m.person_id is not null;
  delete from public.event e where e.shop_id = shop;
  delete from public.relay_cursor c where c.shop_id = shop;
  delete from public.line_batch l where l.shop_id = shop;
  delete from public.order_line l where l.shop_id = shop;
  delete from public.shop_order o where o.shop_id = shop;
  delete from public.forecast f where f.shop_id = shop;
  delete from public.batch b where b.shop_id = shop;
  delete from public.session s where s.shop_id = shop;
  delete from public.shop s where s.id = shop;
  delete from public.person p where p.id = any (people)
    and not exists (select from public.member m where m.person_id = p.id);
end $$;

-- How many migrations are applied, for whoever asks whether the server is ready.
create function entry.migration_count() returns bigint
language sql stable security definer set search_path = public, pg_temp as $$
  select count(*) from drizzle.__drizzle_migrations
$$;

revoke all on all functions in schema entry from public;
grant execute on all functions in schema entry to clamptide_entry;
