-- Evidence is append-only: what was said, sealed, opened or logged is never changed. Only a demo
-- cellar, whose data are invented, may be removed as a whole.
CREATE TRIGGER operations_no_update BEFORE UPDATE ON operations
BEGIN
  SELECT RAISE(ABORT, 'operations are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER operations_no_delete BEFORE DELETE ON operations
WHEN NOT EXISTS (SELECT 1 FROM cellars WHERE id = OLD.cellar_id AND is_demo = 1)
BEGIN
  SELECT RAISE(ABORT, 'operations are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER seals_no_update BEFORE UPDATE ON seals
BEGIN
  SELECT RAISE(ABORT, 'seals are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER seals_no_delete BEFORE DELETE ON seals
WHEN NOT EXISTS (SELECT 1 FROM cellars WHERE id = OLD.cellar_id AND is_demo = 1)
BEGIN
  SELECT RAISE(ABORT, 'seals are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER serving_samples_no_update BEFORE UPDATE ON serving_samples
BEGIN
  SELECT RAISE(ABORT, 'serving_samples are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER serving_samples_no_delete BEFORE DELETE ON serving_samples
WHEN NOT EXISTS (SELECT 1 FROM cellars WHERE id = OLD.cellar_id AND is_demo = 1)
BEGIN
  SELECT RAISE(ABORT, 'serving_samples are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER audit_events_no_update BEFORE UPDATE ON audit_events
BEGIN
  SELECT RAISE(ABORT, 'audit_events are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER audit_events_no_delete BEFORE DELETE ON audit_events
WHEN NOT EXISTS (SELECT 1 FROM cellars WHERE id = OLD.cellar_id AND is_demo = 1)
BEGIN
  SELECT RAISE(ABORT, 'audit_events are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER servings_no_update BEFORE UPDATE ON servings
BEGIN
  SELECT RAISE(ABORT, 'servings are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER servings_no_delete BEFORE DELETE ON servings
WHEN NOT EXISTS (SELECT 1 FROM cellars WHERE id = OLD.cellar_id AND is_demo = 1)
BEGIN
  SELECT RAISE(ABORT, 'servings are append-only');
END;
--> statement-breakpoint
CREATE TRIGGER operations_counted_only_while_open BEFORE INSERT ON operations
WHEN NEW.admission = 'counted' AND NOT EXISTS (SELECT 1 FROM sessions WHERE id = NEW.session_id AND state = 'open')
BEGIN
  SELECT RAISE(ABORT, 'answers count only while the session is open');
END;
--> statement-breakpoint
CREATE TRIGGER serving_samples_only_after_unsealing BEFORE INSERT ON serving_samples
WHEN NOT EXISTS (
  SELECT 1 FROM servings JOIN sessions ON sessions.id = servings.session_id
  WHERE servings.id = NEW.serving_id AND sessions.state = 'unsealed'
)
BEGIN
  SELECT RAISE(ABORT, 'the key is written only after unsealing');
END;
--> statement-breakpoint
CREATE TRIGGER servings_only_while_sealing BEFORE INSERT ON servings
WHEN NOT EXISTS (SELECT 1 FROM sessions WHERE id = NEW.session_id AND state = 'draft')
BEGIN
  SELECT RAISE(ABORT, 'servings are fixed by sealing');
END;
--> statement-breakpoint
CREATE TRIGGER sessions_states_in_order BEFORE UPDATE OF state ON sessions
WHEN NEW.state <> OLD.state AND NOT (
  (OLD.state = 'draft' AND NEW.state = 'sealed') OR
  (OLD.state = 'sealed' AND NEW.state = 'open') OR
  (OLD.state = 'open' AND NEW.state = 'closed') OR
  (OLD.state = 'closed' AND NEW.state = 'unsealed') OR
  (OLD.state <> 'abandoned' AND NEW.state = 'abandoned')
)
BEGIN
  SELECT RAISE(ABORT, 'a session goes draft, sealed, open, closed, unsealed');
END;
--> statement-breakpoint
CREATE TRIGGER ballot_items_fixed_by_sealing BEFORE UPDATE ON ballot_items
WHEN NOT EXISTS (SELECT 1 FROM sessions WHERE id = OLD.session_id AND state = 'draft')
BEGIN
  SELECT RAISE(ABORT, 'ballot_items are fixed by sealing');
END;
--> statement-breakpoint
CREATE TRIGGER samples_fixed_by_sealing BEFORE UPDATE ON samples
WHEN NOT EXISTS (SELECT 1 FROM sessions WHERE id = OLD.session_id AND state = 'draft')
BEGIN
  SELECT RAISE(ABORT, 'samples are fixed by sealing');
END;
