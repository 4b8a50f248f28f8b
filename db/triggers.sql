-- The guards of the ledger. They are dropped and made again from this file by every migration run,
-- because a table rebuild drops a table's triggers without a word. One statement per trigger; the
-- migrator compares what the database holds afterwards with this file.

CREATE TRIGGER entries_never_updated BEFORE UPDATE ON entries
BEGIN SELECT RAISE(ABORT, 'ledger: entries are never changed'); END;

CREATE TRIGGER entries_never_deleted BEFORE DELETE ON entries
BEGIN SELECT RAISE(ABORT, 'ledger: entries are never deleted'); END;

CREATE TRIGGER lines_never_updated BEFORE UPDATE ON lines
BEGIN SELECT RAISE(ABORT, 'ledger: lines are never changed'); END;

CREATE TRIGGER lines_never_deleted BEFORE DELETE ON lines
BEGIN SELECT RAISE(ABORT, 'ledger: lines are never deleted'); END;

CREATE TRIGGER line_parts_never_updated BEFORE UPDATE ON line_parts
BEGIN SELECT RAISE(ABORT, 'ledger: parts of lines are never changed'); END;

CREATE TRIGGER line_parts_never_deleted BEFORE DELETE ON line_parts
BEGIN SELECT RAISE(ABORT, 'ledger: parts of lines are never deleted'); END;

CREATE TRIGGER rows_never_updated BEFORE UPDATE ON "rows"
BEGIN SELECT RAISE(ABORT, 'ledger: rows are never changed'); END;

CREATE TRIGGER rows_never_deleted BEFORE DELETE ON "rows"
BEGIN SELECT RAISE(ABORT, 'ledger: rows are never deleted'); END;

CREATE TRIGGER materials_never_updated BEFORE UPDATE ON materials
BEGIN SELECT RAISE(ABORT, 'ledger: materials are never changed'); END;

CREATE TRIGGER materials_never_deleted BEFORE DELETE ON materials
BEGIN SELECT RAISE(ABORT, 'ledger: materials are never deleted'); END;

CREATE TRIGGER origins_never_updated BEFORE UPDATE ON origins
BEGIN SELECT RAISE(ABORT, 'ledger: origins are never changed'); END;

CREATE TRIGGER origins_never_deleted BEFORE DELETE ON origins
BEGIN SELECT RAISE(ABORT, 'ledger: origins are never deleted'); END;

CREATE TRIGGER holders_never_updated BEFORE UPDATE ON holders
BEGIN SELECT RAISE(ABORT, 'ledger: holders are never changed'); END;

CREATE TRIGGER holders_never_deleted BEFORE DELETE ON holders
BEGIN SELECT RAISE(ABORT, 'ledger: holders are never deleted'); END;

-- Lines and parts go in first, for the entry that comes next; a line for a sealed entry or for one
-- further on is refused.
CREATE TRIGGER lines_for_the_next_entry BEFORE INSERT ON lines
WHEN NEW.entry_id IS NOT (SELECT coalesce(max(id), 0) + 1 FROM entries)
BEGIN SELECT RAISE(ABORT, 'ledger: a line belongs to the next entry only'); END;

CREATE TRIGGER line_parts_for_the_next_entry BEFORE INSERT ON line_parts
WHEN NEW.entry_id IS NOT (SELECT coalesce(max(id), 0) + 1 FROM entries)
BEGIN SELECT RAISE(ABORT, 'ledger: a part belongs to the next entry only'); END;

-- The entry's own row goes in last and seals it.
CREATE TRIGGER entries_sealed BEFORE INSERT ON entries
BEGIN
  SELECT RAISE(ABORT, 'ledger: entry numbers have no gaps')
    WHERE NEW.id IS NOT (SELECT coalesce(max(id), 0) + 1 FROM entries);
  SELECT RAISE(ABORT, 'ledger: an entry follows the hash of the one before')
    WHERE NEW.prev_hash IS NOT coalesce((SELECT hash FROM entries WHERE id = NEW.id - 1), '');
  SELECT RAISE(ABORT, 'ledger: the lines of an entry sum to zero')
    WHERE (SELECT sum(grams) FROM lines WHERE entry_id = NEW.id) IS NOT 0;
  SELECT RAISE(ABORT, 'ledger: the count of lines is wrong')
    WHERE NEW.line_count < 2 OR NEW.line_count IS NOT (SELECT count(*) FROM lines WHERE entry_id = NEW.id);
  SELECT RAISE(ABORT, 'ledger: the count of parts is wrong')
    WHERE NEW.part_count IS NOT (SELECT count(*) FROM line_parts WHERE entry_id = NEW.id);
  SELECT RAISE(ABORT, 'ledger: a part without its line')
    WHERE EXISTS (SELECT 1 FROM line_parts p WHERE p.entry_id = NEW.id
      AND NOT EXISTS (SELECT 1 FROM lines l WHERE l.entry_id = p.entry_id AND l.seq = p.seq));
  SELECT RAISE(ABORT, 'ledger: a line equals its parts by origin and by times heated')
    WHERE EXISTS (SELECT 1 FROM lines l WHERE l.entry_id = NEW.id AND (
      l.grams IS NOT (SELECT sum(grams) FROM line_parts p WHERE p.entry_id = NEW.id AND p.seq = l.seq AND p.dim = 'O')
      OR l.grams IS NOT (SELECT sum(grams) FROM line_parts p WHERE p.entry_id = NEW.id AND p.seq = l.seq AND p.dim = 'H')));
  SELECT RAISE(ABORT, 'ledger: the month is closed')
    WHERE EXISTS (SELECT 1 FROM periods WHERE month >= substr(NEW.booked_day, 1, 7));
END;

CREATE TRIGGER periods_never_updated BEFORE UPDATE ON periods
BEGIN SELECT RAISE(ABORT, 'ledger: a closed month is never changed'); END;

CREATE TRIGGER periods_never_deleted BEFORE DELETE ON periods
BEGIN SELECT RAISE(ABORT, 'ledger: a closed month is never opened again'); END;

CREATE TRIGGER periods_in_order BEFORE INSERT ON periods
WHEN EXISTS (SELECT 1 FROM periods WHERE month >= NEW.month)
BEGIN SELECT RAISE(ABORT, 'ledger: months close in order'); END;

-- Days and months are in the scheme's zone: it is fixed at the first entry, and so is the notes' salt.
CREATE TRIGGER scheme_zone_fixed BEFORE UPDATE OF time_zone, note_salt, first_day ON scheme
WHEN EXISTS (SELECT 1 FROM entries)
  AND (NEW.time_zone IS NOT OLD.time_zone OR NEW.note_salt IS NOT OLD.note_salt OR NEW.first_day IS NOT OLD.first_day)
BEGIN SELECT RAISE(ABORT, 'ledger: the time zone is fixed at the first entry'); END;

CREATE TRIGGER receipts_never_updated BEFORE UPDATE ON receipts
BEGIN SELECT RAISE(ABORT, 'receipts are kept as they were'); END;

CREATE TRIGGER receipts_never_deleted BEFORE DELETE ON receipts
BEGIN SELECT RAISE(ABORT, 'receipts are kept for good'); END;

CREATE TRIGGER audit_events_never_updated BEFORE UPDATE ON audit_events
BEGIN SELECT RAISE(ABORT, 'the audit is never changed'); END;

CREATE TRIGGER audit_events_never_deleted BEFORE DELETE ON audit_events
BEGIN SELECT RAISE(ABORT, 'the audit is never deleted'); END;
