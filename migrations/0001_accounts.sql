-- Who signs in, for which firm. Times are seconds since 1970, UTC.

create table firm (
    firm_id integer primary key,
    profile text not null check (json_valid(profile)),
    made_up integer not null default 0 check (made_up in (0, 1)),
    revision integer not null default 1,
    created_at integer not null
) strict;

create table person (
    person_id integer primary key,
    firm_id integer not null references firm (firm_id),
    name text not null check (length(name) between 1 and 120),
    email text not null check (length(email) between 3 and 254),
    -- what two spellings of one address have in common
    email_folded text not null unique,
    password_hash text not null,
    created_at integer not null
) strict;

create index person_of_firm on person (firm_id);

-- Only a hash of the cookie's secret is kept, so that a leaked copy signs nobody in.
create table session (
    token_hash blob primary key check (length(token_hash) = 32),
    person_id integer not null references person (person_id) on delete cascade,
    created_at integer not null,
    seen_at integer not null,
    ends_at integer not null
) strict, without rowid;

create index session_of_person on session (person_id);

-- Failed tries to sign in, by e-mail and place they came from, and by place alone.
create table sign_in_attempt (
    whose text not null,
    at integer not null
) strict;

create index attempt_by_whose on sign_in_attempt (whose, at);

-- One submit, one record: the key of a form, and what its first arrival made.
create table submission (
    owner_id integer not null,
    one_time_key text not null check (length(one_time_key) between 16 and 64),
    result_id integer not null,
    at integer not null,
    primary key (owner_id, one_time_key)
) strict, without rowid;

create index submission_by_age on submission (at);
