-- What the customer was shown. A row is written once; a change is a new version.

create table quote_version (
    version_id integer primary key,
    firm_id integer not null references firm (firm_id),
    job_id integer not null references job (job_id),
    -- counts the firm's sheets: never given twice, never taken back
    number integer not null,
    -- counts the versions of one job
    version integer not null,
    sheet blob not null,
    sheet_sha256 blob not null check (length(sheet_sha256) = 32),
    survey text not null check (json_valid(survey)),
    design text not null check (json_valid(design)),
    program_version text not null,
    made_by text not null,
    made_at integer not null,
    unique (firm_id, number),
    unique (job_id, version)
) strict;

create trigger quote_version_is_final before update on quote_version
begin
    select raise(abort, 'a quote version is never changed');
end;

create trigger quote_version_stays before delete on quote_version
begin
    select raise(abort, 'a quote version is never deleted');
end;

-- The link is a key: whoever holds it may open the sheet, so only its hash is kept.
create table share_link (
    link_id integer primary key,
    firm_id integer not null references firm (firm_id),
    version_id integer not null references quote_version (version_id),
    token_hash blob not null unique check (length(token_hash) = 32),
    made_at integer not null,
    ends_at integer not null,
    cancelled_at integer
) strict;

create index link_of_version on share_link (version_id);

-- The customer's yes or no: one for each version, final.
create table answer (
    answer_id integer primary key,
    version_id integer not null unique references quote_version (version_id),
    link_id integer not null references share_link (link_id),
    said text not null check (said in ('yes', 'no')),
    name text not null check (length(name) between 1 and 120),
    words text not null check (length(words) <= 2000),
    at integer not null
) strict;

create trigger answer_is_final before update on answer
begin
    select raise(abort, 'an answer is never changed');
end;

create trigger answer_stays before delete on answer
begin
    select raise(abort, 'an answer is never deleted');
end;

-- Who did what to a job; rows are only ever added.
create table audit (
    audit_id integer primary key,
    firm_id integer not null references firm (firm_id),
    job_id integer references job (job_id),
    who text not null,
    did text not null,
    at integer not null
) strict;

create index audit_of_job on audit (job_id, audit_id);

create trigger audit_is_final before update on audit
begin
    select raise(abort, 'the audit is only added to');
end;

create trigger audit_stays before delete on audit
begin
    select raise(abort, 'the audit is only added to');
end;
