CREATE EXTENSION IF NOT EXISTS btree_gist;
--> statement-breakpoint
ALTER TABLE "operations" ADD CONSTRAINT "operations_one_at_a_time" EXCLUDE USING gist ("work_centre_id" WITH =, "planned_span" WITH &&) WHERE ("work_centre_id" IS NOT NULL);
--> statement-breakpoint
ALTER TABLE "orders" ADD CONSTRAINT "orders_accepted_quote_fk" FOREIGN KEY ("accepted_quote_id") REFERENCES "quotes"("id");
--> statement-breakpoint
ALTER TABLE "email_tokens" ADD CONSTRAINT "email_tokens_order_fk" FOREIGN KEY ("order_id") REFERENCES "orders"("id");
--> statement-breakpoint
CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION '% is append-only', TG_TABLE_NAME USING ERRCODE = 'restrict_violation';
END $$;
--> statement-breakpoint
CREATE TRIGGER order_events_append_only BEFORE UPDATE OR DELETE ON "order_events" FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER ledger_transactions_append_only BEFORE UPDATE OR DELETE ON "ledger_transactions" FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER ledger_entries_append_only BEFORE UPDATE OR DELETE ON "ledger_entries" FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER bench_records_append_only BEFORE UPDATE OR DELETE ON "bench_records" FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER audit_log_append_only BEFORE UPDATE OR DELETE ON "audit_log" FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
-- A state without its event, or an event without its state, cannot be committed.
CREATE FUNCTION check_order_state() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE last_state order_state; now_state order_state;
BEGIN
  SELECT state INTO now_state FROM orders WHERE id = NEW.id;
  SELECT to_state INTO last_state FROM order_events WHERE order_id = NEW.id ORDER BY id DESC LIMIT 1;
  IF last_state IS DISTINCT FROM now_state THEN
    RAISE EXCEPTION 'order % is % but its last event says %', NEW.id, now_state, last_state USING ERRCODE = 'check_violation';
  END IF;
  RETURN NULL;
END $$;
--> statement-breakpoint
CREATE CONSTRAINT TRIGGER orders_state_has_event AFTER INSERT OR UPDATE OF state ON "orders" DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION check_order_state();
--> statement-breakpoint
CREATE FUNCTION check_event_state() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE last_state order_state; now_state order_state;
BEGIN
  SELECT state INTO now_state FROM orders WHERE id = NEW.order_id;
  SELECT to_state INTO last_state FROM order_events WHERE order_id = NEW.order_id ORDER BY id DESC LIMIT 1;
  IF last_state IS DISTINCT FROM now_state THEN
    RAISE EXCEPTION 'order % is % but its last event says %', NEW.order_id, now_state, last_state USING ERRCODE = 'check_violation';
  END IF;
  RETURN NULL;
END $$;
--> statement-breakpoint
CREATE CONSTRAINT TRIGGER order_events_match_state AFTER INSERT ON "order_events" DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION check_event_state();
--> statement-breakpoint
-- The entries of a transaction sum to nought in each currency, and there are at least two.
CREATE FUNCTION check_ledger_balance() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF EXISTS (SELECT 1 FROM ledger_entries WHERE transaction_id = NEW.transaction_id GROUP BY currency HAVING sum(amount_minor) <> 0) THEN
    RAISE EXCEPTION 'ledger transaction % does not balance', NEW.transaction_id USING ERRCODE = 'check_violation';
  END IF;
  RETURN NULL;
END $$;
--> statement-breakpoint
CREATE CONSTRAINT TRIGGER ledger_entries_balance AFTER INSERT ON "ledger_entries" DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION check_ledger_balance();
--> statement-breakpoint
-- No job without a paid deposit.
CREATE FUNCTION check_job_paid() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF NOT EXISTS (SELECT 1 FROM payments WHERE order_id = NEW.order_id AND kind = 'deposit' AND state = 'paid') THEN
    RAISE EXCEPTION 'order % has no paid deposit', NEW.order_id USING ERRCODE = 'check_violation';
  END IF;
  RETURN NULL;
END $$;
--> statement-breakpoint
CREATE CONSTRAINT TRIGGER jobs_need_deposit AFTER INSERT OR UPDATE OF order_id ON "jobs" DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION check_job_paid();
--> statement-breakpoint
-- A payment that is paid stays paid; no later message can unpay it.
CREATE FUNCTION keep_paid() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF OLD.state = 'paid' AND NEW.state <> 'paid' THEN
    RAISE EXCEPTION 'payment % is paid', OLD.id USING ERRCODE = 'restrict_violation';
  END IF;
  RETURN NEW;
END $$;
--> statement-breakpoint
CREATE TRIGGER payments_stay_paid BEFORE UPDATE ON "payments" FOR EACH ROW EXECUTE FUNCTION keep_paid();
--> statement-breakpoint
-- A sent quote never changes: it can only be superseded by the next revision.
CREATE FUNCTION freeze_sent_quote() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF TG_OP = 'DELETE' THEN
    IF OLD.state <> 'draft' THEN RAISE EXCEPTION 'quote % was sent', OLD.id USING ERRCODE = 'restrict_violation'; END IF;
    RETURN OLD;
  END IF;
  IF OLD.state <> 'draft' AND (to_jsonb(NEW) - 'state' IS DISTINCT FROM to_jsonb(OLD) - 'state' OR NEW.state = 'draft' OR (OLD.state = 'superseded' AND NEW.state <> 'superseded')) THEN
    RAISE EXCEPTION 'quote % was sent', OLD.id USING ERRCODE = 'restrict_violation';
  END IF;
  RETURN NEW;
END $$;
--> statement-breakpoint
CREATE TRIGGER quotes_frozen BEFORE UPDATE OR DELETE ON "quotes" FOR EACH ROW EXECUTE FUNCTION freeze_sent_quote();
--> statement-breakpoint
CREATE FUNCTION freeze_sent_prices() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE quote uuid;
BEGIN
  IF TG_TABLE_NAME = 'quote_prices' THEN quote := OLD.quote_id; ELSE SELECT quote_id INTO quote FROM quote_prices WHERE id = OLD.quote_price_id; END IF;
  IF EXISTS (SELECT 1 FROM quotes WHERE id = quote AND state <> 'draft') THEN
    RAISE EXCEPTION 'quote % was sent', quote USING ERRCODE = 'restrict_violation';
  END IF;
  IF TG_OP = 'DELETE' THEN RETURN OLD; END IF;
  RETURN NEW;
END $$;
--> statement-breakpoint
CREATE TRIGGER quote_prices_frozen BEFORE UPDATE OR DELETE ON "quote_prices" FOR EACH ROW EXECUTE FUNCTION freeze_sent_prices();
--> statement-breakpoint
CREATE TRIGGER quote_lines_frozen BEFORE UPDATE OR DELETE ON "quote_lines" FOR EACH ROW EXECUTE FUNCTION freeze_sent_prices();
--> statement-breakpoint
-- The lines of a rung add up to its price before tax.
CREATE FUNCTION check_lines_add_up() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE rung uuid; net bigint; lines bigint;
BEGIN
  IF TG_TABLE_NAME = 'quote_prices' THEN rung := NEW.id; ELSE rung := NEW.quote_price_id; END IF;
  SELECT net_minor INTO net FROM quote_prices WHERE id = rung;
  IF net IS NULL THEN RETURN NULL; END IF;
  SELECT coalesce(sum(amount_minor), 0) INTO lines FROM quote_lines WHERE quote_price_id = rung;
  IF net <> lines THEN
    RAISE EXCEPTION 'the lines of rung % add up to %, not %', rung, lines, net USING ERRCODE = 'check_violation';
  END IF;
  RETURN NULL;
END $$;
--> statement-breakpoint
CREATE CONSTRAINT TRIGGER quote_prices_lines AFTER INSERT OR UPDATE ON "quote_prices" DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION check_lines_add_up();
--> statement-breakpoint
CREATE CONSTRAINT TRIGGER quote_lines_add_up AFTER INSERT OR UPDATE ON "quote_lines" DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION check_lines_add_up();
