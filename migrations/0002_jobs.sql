-- One customer's site. The survey and the prices are versioned JSON documents beside the columns
-- that are searched.

create table job (
    job_id integer primary key,
    firm_id integer not null references firm (firm_id),
    customer text not null check (length(customer) <= 120),
    place text not null check (length(place) <= 200),
    phone text not null check (length(phone) <= 40),
    note text not null check (length(note) <= 4000),
    -- customer, place and phone, folded for searching
    searched text not null,
    state text not null
        check (state in ('being_sized', 'priced', 'sent', 'agreed', 'turned_down', 'fitted')),
    survey text not null check (json_valid(survey)),
    price text check (price is null or json_valid(price)),
    revision integer not null default 1,
    created_at integer not null,
    touched_at integer not null,
    binned_at integer
) strict;

create index job_of_firm on job (firm_id, touched_at desc);
