import type { Client } from 'pg'

/**
 * What is checked is what is issued, and what was issued stays: the guard of exhibit_revisions,
 * for the owner too. Every rule names itself in its refusal.
 */
const freezeExhibits = `
create or replace function freeze_exhibit_revision() returns trigger language plpgsql as $$
declare
  refuse text;
begin
  if tg_op = 'DELETE' then
    raise exception 'exhibit revision % (%) cannot be deleted', old.no, old.state
      using errcode = 'restrict_violation';
  end if;
  if new.checked_by is not null and new.checked_by = new.prepared_by then
    refuse := 'its preparer cannot check it';
  elsif new.id <> old.id or new.exhibit_id <> old.exhibit_id or new.no <> old.no then
    refuse := 'its number stays';
  elsif old.state = 'superseded' then
    refuse := 'it gave way to a later one and stays as it is';
  elsif old.state = 'issued' then
    if new.state <> 'superseded' or to_jsonb(new) - 'state' <> to_jsonb(old) - 'state' then
      refuse := 'it is issued and frozen';
    elsif not exists (select from exhibit_revisions later
                      where later.exhibit_id = old.exhibit_id and later.no > old.no
                        and later.state = 'issued') then
      refuse := 'only a later issue supersedes it';
    end if;
  elsif new.state = 'issued' and (old.state <> 'checked' or new.file_sha256 is null
                                  or new.checked_by is null or new.issued_by is null) then
    refuse := 'only a checked one with its document can be issued';
  elsif old.state = 'checked' then
    if new.state = 'draft' then
      refuse := 'it is checked and no draft any more';
    elsif old.file_sha256 is not null and new.file_sha256 is distinct from old.file_sha256 then
      refuse := 'it is checked: its document stays';
    elsif new.data <> old.data or new.calculation_id is distinct from old.calculation_id
          or new.design_revision_id is distinct from old.design_revision_id
          or new.checked_by is distinct from old.checked_by
          or new.prepared_by <> old.prepared_by then
      refuse := 'it is checked: what it holds stays';
    end if;
  end if;
  if refuse is not null then
    raise exception 'exhibit revision %: %', old.no, refuse using errcode = 'restrict_violation';
  end if;
  return new;
end $$;
create or replace trigger exhibit_revisions_frozen_rows before update or delete
  on exhibit_revisions for each row execute function freeze_exhibit_revision();
create or replace trigger exhibit_revisions_frozen_table before truncate
  on exhibit_revisions for each statement execute function refuse_change();`

/** Guards checked and issued exhibit revisions. Run after the guards of the append-only tables. */
export async function guardFrozenExhibits(client: Client): Promise<void> {
  await client.query(freezeExhibits)
}
