CREATE TYPE "public"."role" AS ENUM('customer', 'estimator', 'supervisor', 'operator', 'bookkeeper', 'admin');--> statement-breakpoint
CREATE TYPE "public"."token_purpose" AS ENUM('confirm-address', 'sign-in', 'reset-password');--> statement-breakpoint
CREATE TYPE "public"."centre_kind" AS ENUM('coiling', 'stress-relief', 'end-grinding', 'inspection', 'packing');--> statement-breakpoint
CREATE TYPE "public"."order_state" AS ENUM('enquiry', 'quoted', 'accepted', 'deposit-paid', 'planned', 'in-work', 'finished', 'dispatched', 'settled', 'withdrawn', 'expired', 'cancelled');--> statement-breakpoint
CREATE TYPE "public"."quote_state" AS ENUM('draft', 'sent', 'superseded');--> statement-breakpoint
CREATE TYPE "public"."payment_kind" AS ENUM('deposit', 'balance');--> statement-breakpoint
CREATE TYPE "public"."payment_state" AS ENUM('opening', 'open', 'processing', 'paid', 'failed', 'expired');--> statement-breakpoint
CREATE TYPE "public"."stripe_event_state" AS ENUM('waiting', 'done', 'ignored', 'quarantined', 'dead');--> statement-breakpoint
CREATE TYPE "public"."bench_act" AS ENUM('start', 'run', 'pause', 'resume', 'count', 'finish');--> statement-breakpoint
CREATE TYPE "public"."job_state" AS ENUM('to-plan', 'planned', 'in-work', 'finished', 'dispatched', 'cancelled');--> statement-breakpoint
CREATE TYPE "public"."operation_kind" AS ENUM('coiling', 'stress-relief', 'end-grinding', 'inspection', 'packing');--> statement-breakpoint
CREATE TYPE "public"."operation_state" AS ENUM('waiting', 'planned', 'setting-up', 'running', 'paused', 'finished');--> statement-breakpoint
CREATE TABLE "companies" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"country_code" text NOT NULL,
	"vat_number" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "companies_country_code" CHECK ("companies"."country_code" ~ '^[A-Z]{2}$')
);
--> statement-breakpoint
CREATE TABLE "email_tokens" (
	"token_hash" "bytea" PRIMARY KEY NOT NULL,
	"purpose" "token_purpose" NOT NULL,
	"email" text NOT NULL,
	"order_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"used_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "idempotency_keys" (
	"scope" text NOT NULL,
	"key" text NOT NULL,
	"fingerprint" "bytea" NOT NULL,
	"response" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "idempotency_keys_scope_key_pk" PRIMARY KEY("scope","key")
);
--> statement-breakpoint
CREATE TABLE "people" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"email" text NOT NULL,
	"name" text NOT NULL,
	"company_id" uuid,
	"password_hash" text,
	"email_confirmed_at" timestamp with time zone,
	"is_demo" boolean DEFAULT false NOT NULL,
	"disabled_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "people_email_lower" CHECK ("people"."email" = lower("people"."email"))
);
--> statement-breakpoint
CREATE TABLE "person_roles" (
	"person_id" uuid NOT NULL,
	"role" "role" NOT NULL,
	CONSTRAINT "person_roles_person_id_role_pk" PRIMARY KEY("person_id","role")
);
--> statement-breakpoint
CREATE TABLE "rate_counters" (
	"key" text NOT NULL,
	"window_start" timestamp with time zone NOT NULL,
	"hits" integer NOT NULL,
	CONSTRAINT "rate_counters_key_window_start_pk" PRIMARY KEY("key","window_start")
);
--> statement-breakpoint
CREATE TABLE "sessions" (
	"token_hash" "bytea" PRIMARY KEY NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"person_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"last_seen_at" timestamp with time zone DEFAULT now() NOT NULL,
	"idle_minutes" integer NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"revoked_at" timestamp with time zone,
	CONSTRAINT "sessions_id_unique" UNIQUE("id")
);
--> statement-breakpoint
CREATE TABLE "audit_log" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"person_id" uuid,
	"action" text NOT NULL,
	"object" text NOT NULL,
	"detail" text NOT NULL
);
--> statement-breakpoint
CREATE TABLE "holidays" (
	"day" date PRIMARY KEY NOT NULL,
	"name" text NOT NULL
);
--> statement-breakpoint
CREATE TABLE "price_book_rates" (
	"price_book_id" uuid NOT NULL,
	"code" text NOT NULL,
	"value" numeric(16, 6) NOT NULL,
	CONSTRAINT "price_book_rates_price_book_id_code_pk" PRIMARY KEY("price_book_id","code")
);
--> statement-breakpoint
CREATE TABLE "price_books" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"number" integer NOT NULL,
	"currency" text NOT NULL,
	"in_force_from" date NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "price_books_number_unique" UNIQUE("number")
);
--> statement-breakpoint
CREATE TABLE "wire_products" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"material" text NOT NULL,
	"wire_diameter_mm" double precision NOT NULL,
	"price_per_kg" numeric(12, 4) NOT NULL,
	"currency" text NOT NULL,
	"stock_kg" numeric(12, 3) NOT NULL,
	"smallest_purchase_kg" numeric(12, 3) NOT NULL,
	"lead_days" integer NOT NULL,
	"is_active" boolean DEFAULT true NOT NULL,
	CONSTRAINT "wire_products_positive" CHECK ("wire_products"."wire_diameter_mm" > 0 and "wire_products"."price_per_kg" > 0 and "wire_products"."stock_kg" >= 0 and "wire_products"."smallest_purchase_kg" > 0 and "wire_products"."lead_days" >= 0)
);
--> statement-breakpoint
CREATE TABLE "work_centres" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"code" text NOT NULL,
	"name" text NOT NULL,
	"kind" "centre_kind" NOT NULL,
	"wire_from_mm" double precision,
	"wire_to_mm" double precision,
	"shift_start_minute" integer NOT NULL,
	"shift_end_minute" integer NOT NULL,
	"works_saturday" boolean DEFAULT false NOT NULL,
	"is_active" boolean DEFAULT true NOT NULL,
	CONSTRAINT "work_centres_code_unique" UNIQUE("code"),
	CONSTRAINT "work_centres_shift" CHECK ("work_centres"."shift_start_minute" >= 0 and "work_centres"."shift_end_minute" <= 1440 and "work_centres"."shift_start_minute" < "work_centres"."shift_end_minute")
);
--> statement-breakpoint
CREATE TABLE "order_events" (
	"id" bigint PRIMARY KEY GENERATED ALWAYS AS IDENTITY (sequence name "order_events_id_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1),
	"order_id" uuid NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"person_id" uuid,
	"from_state" "order_state",
	"to_state" "order_state" NOT NULL,
	"why" text NOT NULL
);
--> statement-breakpoint
CREATE TABLE "orders" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"number" bigint GENERATED ALWAYS AS IDENTITY (sequence name "orders_number_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 2401 CACHE 1),
	"access_hash" "bytea" NOT NULL,
	"state" "order_state" DEFAULT 'enquiry' NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"company_id" uuid,
	"person_id" uuid,
	"contact_name" text NOT NULL,
	"contact_email" text NOT NULL,
	"firm_name" text NOT NULL,
	"country_code" text NOT NULL,
	"vat_number" text,
	"title" text NOT NULL,
	"request" jsonb NOT NULL,
	"gate_reasons" jsonb NOT NULL,
	"could_hurt" boolean NOT NULL,
	"needed_on" date,
	"answer_by" timestamp with time zone,
	"assigned_to" uuid,
	"accepted_quantity" integer,
	"accepted_quote_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "orders_number_unique" UNIQUE("number"),
	CONSTRAINT "orders_email_lower" CHECK ("orders"."contact_email" = lower("orders"."contact_email")),
	CONSTRAINT "orders_accepted" CHECK ("orders"."state" in ('enquiry', 'quoted', 'withdrawn', 'expired', 'cancelled') or ("orders"."accepted_quantity" is not null and "orders"."accepted_quote_id" is not null))
);
--> statement-breakpoint
CREATE TABLE "quote_lines" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"quote_price_id" uuid NOT NULL,
	"position" integer NOT NULL,
	"code" text NOT NULL,
	"label" text NOT NULL,
	"basis" text NOT NULL,
	"rate_text" text NOT NULL,
	"quantity" numeric(16, 6) NOT NULL,
	"quantity_unit" text NOT NULL,
	"rate" numeric(16, 6) NOT NULL,
	"computed_amount_minor" bigint NOT NULL,
	"amount_minor" bigint NOT NULL,
	"override_reason" text,
	"overridden_by" uuid,
	"overridden_at" timestamp with time zone,
	CONSTRAINT "quote_lines_override" CHECK (("quote_lines"."override_reason" is null and "quote_lines"."overridden_by" is null) or (length("quote_lines"."override_reason") > 0 and "quote_lines"."overridden_by" is not null and "quote_lines"."overridden_at" is not null))
);
--> statement-breakpoint
CREATE TABLE "quote_prices" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"quote_id" uuid NOT NULL,
	"quantity" integer NOT NULL,
	"cost_minor" bigint NOT NULL,
	"net_minor" bigint NOT NULL,
	"tax_minor" bigint NOT NULL,
	"gross_minor" bigint NOT NULL,
	"deposit_minor" bigint NOT NULL,
	"wire_planned_kg" numeric(12, 4) NOT NULL,
	"dispatch_on" date,
	CONSTRAINT "quote_prices_add_up" CHECK ("quote_prices"."net_minor" + "quote_prices"."tax_minor" = "quote_prices"."gross_minor" and "quote_prices"."deposit_minor" between 0 and "quote_prices"."gross_minor" and "quote_prices"."quantity" > 0 and "quote_prices"."net_minor" >= 0)
);
--> statement-breakpoint
CREATE TABLE "quotes" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"order_id" uuid NOT NULL,
	"revision" text NOT NULL,
	"state" "quote_state" DEFAULT 'draft' NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"price_book_id" uuid NOT NULL,
	"wire_product_id" uuid,
	"design" jsonb,
	"margin_percent_override" numeric(7, 3),
	"margin_reason" text,
	"currency" text NOT NULL,
	"deposit_percent" numeric(7, 3) NOT NULL,
	"tax_percent" numeric(7, 3) NOT NULL,
	"note_to_customer" text DEFAULT '' NOT NULL,
	"valid_until" date NOT NULL,
	"created_by" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"sent_at" timestamp with time zone,
	"sent_by" uuid,
	CONSTRAINT "quotes_sent_complete" CHECK ("quotes"."state" = 'draft' or ("quotes"."sent_at" is not null and "quotes"."design" is not null))
);
--> statement-breakpoint
CREATE TABLE "ledger_entries" (
	"id" bigint PRIMARY KEY GENERATED ALWAYS AS IDENTITY (sequence name "ledger_entries_id_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1),
	"transaction_id" bigint NOT NULL,
	"account" text NOT NULL,
	"amount_minor" bigint NOT NULL,
	"currency" text NOT NULL
);
--> statement-breakpoint
CREATE TABLE "ledger_transactions" (
	"id" bigint PRIMARY KEY GENERATED ALWAYS AS IDENTITY (sequence name "ledger_transactions_id_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1),
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"order_id" uuid NOT NULL,
	"payment_id" uuid,
	"fact" text NOT NULL,
	"words" text NOT NULL,
	CONSTRAINT "ledger_transactions_fact_unique" UNIQUE("fact")
);
--> statement-breakpoint
CREATE TABLE "payments" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"order_id" uuid NOT NULL,
	"kind" "payment_kind" NOT NULL,
	"attempt" integer NOT NULL,
	"state" "payment_state" DEFAULT 'opening' NOT NULL,
	"amount_minor" bigint NOT NULL,
	"currency" text NOT NULL,
	"idempotency_key" text NOT NULL,
	"stripe_session_id" text,
	"stripe_payment_intent_id" text,
	"url" text,
	"expires_at" timestamp with time zone NOT NULL,
	"paid_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "payments_idempotency_key_unique" UNIQUE("idempotency_key"),
	CONSTRAINT "payments_stripe_session_id_unique" UNIQUE("stripe_session_id"),
	CONSTRAINT "payments_stripe_payment_intent_id_unique" UNIQUE("stripe_payment_intent_id"),
	CONSTRAINT "payments_paid" CHECK (("payments"."state" = 'paid') = ("payments"."paid_at" is not null)),
	CONSTRAINT "payments_amount" CHECK ("payments"."amount_minor" > 0)
);
--> statement-breakpoint
CREATE TABLE "stripe_events" (
	"id" text PRIMARY KEY NOT NULL,
	"type" text NOT NULL,
	"payload" jsonb NOT NULL,
	"state" "stripe_event_state" DEFAULT 'waiting' NOT NULL,
	"outcome" text,
	"attempts" integer DEFAULT 0 NOT NULL,
	"run_at" timestamp with time zone DEFAULT now() NOT NULL,
	"received_at" timestamp with time zone DEFAULT now() NOT NULL,
	"done_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "bench_records" (
	"id" uuid PRIMARY KEY NOT NULL,
	"operation_id" uuid NOT NULL,
	"act" "bench_act" NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"person_id" uuid NOT NULL,
	"good" integer DEFAULT 0 NOT NULL,
	"scrap" integer DEFAULT 0 NOT NULL,
	"wire_kg" numeric(12, 4),
	"note" text DEFAULT '' NOT NULL
);
--> statement-breakpoint
CREATE TABLE "jobs" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"number" bigint GENERATED ALWAYS AS IDENTITY (sequence name "jobs_number_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1201 CACHE 1),
	"order_id" uuid NOT NULL,
	"quote_price_id" uuid NOT NULL,
	"quantity" integer NOT NULL,
	"state" "job_state" DEFAULT 'to-plan' NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"promised_on" date,
	"waits_for_wire" boolean DEFAULT false NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"finished_at" timestamp with time zone,
	CONSTRAINT "jobs_number_unique" UNIQUE("number"),
	CONSTRAINT "jobs_order_id_unique" UNIQUE("order_id")
);
--> statement-breakpoint
CREATE TABLE "operations" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"job_id" uuid NOT NULL,
	"position" integer NOT NULL,
	"kind" "operation_kind" NOT NULL,
	"state" "operation_state" DEFAULT 'waiting' NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"set_up_minutes" numeric(10, 2) NOT NULL,
	"run_minutes" numeric(10, 2) NOT NULL,
	"work_centre_id" uuid,
	"planned_span" "tstzrange",
	"started_at" timestamp with time zone,
	"finished_at" timestamp with time zone,
	"good_count" integer,
	"scrap_count" integer,
	"actual_set_up_minutes" numeric(10, 2),
	"actual_run_minutes" numeric(10, 2),
	"wire_used_kg" numeric(12, 4),
	CONSTRAINT "operations_planned" CHECK (("operations"."work_centre_id" is null) = ("operations"."planned_span" is null)),
	CONSTRAINT "operations_finished" CHECK ("operations"."state" <> 'finished' or ("operations"."finished_at" is not null and "operations"."good_count" >= 0 and "operations"."scrap_count" >= 0))
);
--> statement-breakpoint
CREATE TABLE "wire_reservations" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"job_id" uuid NOT NULL,
	"wire_product_id" uuid NOT NULL,
	"mass_kg" numeric(12, 4) NOT NULL,
	"used_kg" numeric(12, 4),
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "wire_reservations_job_id_unique" UNIQUE("job_id"),
	CONSTRAINT "wire_reservations_positive" CHECK ("wire_reservations"."mass_kg" > 0)
);
--> statement-breakpoint
CREATE TABLE "outbox" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"kind" text NOT NULL,
	"object_id" text NOT NULL,
	"recipient" text NOT NULL,
	"step" text DEFAULT '' NOT NULL,
	"order_id" uuid,
	"payload" jsonb NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"run_at" timestamp with time zone DEFAULT now() NOT NULL,
	"leased_until" timestamp with time zone,
	"attempts" integer DEFAULT 0 NOT NULL,
	"sent_at" timestamp with time zone,
	"skipped_at" timestamp with time zone,
	"dead_at" timestamp with time zone,
	"last_error" text
);
--> statement-breakpoint
ALTER TABLE "people" ADD CONSTRAINT "people_company_id_companies_id_fk" FOREIGN KEY ("company_id") REFERENCES "public"."companies"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "person_roles" ADD CONSTRAINT "person_roles_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sessions" ADD CONSTRAINT "sessions_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "price_book_rates" ADD CONSTRAINT "price_book_rates_price_book_id_price_books_id_fk" FOREIGN KEY ("price_book_id") REFERENCES "public"."price_books"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_events" ADD CONSTRAINT "order_events_order_id_orders_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."orders"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_events" ADD CONSTRAINT "order_events_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "orders" ADD CONSTRAINT "orders_company_id_companies_id_fk" FOREIGN KEY ("company_id") REFERENCES "public"."companies"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "orders" ADD CONSTRAINT "orders_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "orders" ADD CONSTRAINT "orders_assigned_to_people_id_fk" FOREIGN KEY ("assigned_to") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "quote_lines" ADD CONSTRAINT "quote_lines_quote_price_id_quote_prices_id_fk" FOREIGN KEY ("quote_price_id") REFERENCES "public"."quote_prices"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "quote_lines" ADD CONSTRAINT "quote_lines_overridden_by_people_id_fk" FOREIGN KEY ("overridden_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "quote_prices" ADD CONSTRAINT "quote_prices_quote_id_quotes_id_fk" FOREIGN KEY ("quote_id") REFERENCES "public"."quotes"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "quotes" ADD CONSTRAINT "quotes_order_id_orders_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."orders"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "quotes" ADD CONSTRAINT "quotes_price_book_id_price_books_id_fk" FOREIGN KEY ("price_book_id") REFERENCES "public"."price_books"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "quotes" ADD CONSTRAINT "quotes_wire_product_id_wire_products_id_fk" FOREIGN KEY ("wire_product_id") REFERENCES "public"."wire_products"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "quotes" ADD CONSTRAINT "quotes_created_by_people_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "quotes" ADD CONSTRAINT "quotes_sent_by_people_id_fk" FOREIGN KEY ("sent_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "ledger_entries" ADD CONSTRAINT "ledger_entries_transaction_id_ledger_transactions_id_fk" FOREIGN KEY ("transaction_id") REFERENCES "public"."ledger_transactions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "ledger_transactions" ADD CONSTRAINT "ledger_transactions_order_id_orders_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."orders"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "ledger_transactions" ADD CONSTRAINT "ledger_transactions_payment_id_payments_id_fk" FOREIGN KEY ("payment_id") REFERENCES "public"."payments"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "payments" ADD CONSTRAINT "payments_order_id_orders_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."orders"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "bench_records" ADD CONSTRAINT "bench_records_operation_id_operations_id_fk" FOREIGN KEY ("operation_id") REFERENCES "public"."operations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "bench_records" ADD CONSTRAINT "bench_records_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "jobs" ADD CONSTRAINT "jobs_order_id_orders_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."orders"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "jobs" ADD CONSTRAINT "jobs_quote_price_id_quote_prices_id_fk" FOREIGN KEY ("quote_price_id") REFERENCES "public"."quote_prices"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "operations" ADD CONSTRAINT "operations_job_id_jobs_id_fk" FOREIGN KEY ("job_id") REFERENCES "public"."jobs"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "operations" ADD CONSTRAINT "operations_work_centre_id_work_centres_id_fk" FOREIGN KEY ("work_centre_id") REFERENCES "public"."work_centres"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "wire_reservations" ADD CONSTRAINT "wire_reservations_job_id_jobs_id_fk" FOREIGN KEY ("job_id") REFERENCES "public"."jobs"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "wire_reservations" ADD CONSTRAINT "wire_reservations_wire_product_id_wire_products_id_fk" FOREIGN KEY ("wire_product_id") REFERENCES "public"."wire_products"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "outbox" ADD CONSTRAINT "outbox_order_id_orders_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."orders"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "email_tokens_email" ON "email_tokens" USING btree ("email");--> statement-breakpoint
CREATE INDEX "email_tokens_expiry" ON "email_tokens" USING btree ("expires_at");--> statement-breakpoint
CREATE INDEX "idempotency_keys_created" ON "idempotency_keys" USING btree ("created_at");--> statement-breakpoint
CREATE UNIQUE INDEX "people_email_unique" ON "people" USING btree ("email");--> statement-breakpoint
CREATE INDEX "people_company" ON "people" USING btree ("company_id");--> statement-breakpoint
CREATE INDEX "rate_counters_window" ON "rate_counters" USING btree ("window_start");--> statement-breakpoint
CREATE INDEX "sessions_person" ON "sessions" USING btree ("person_id");--> statement-breakpoint
CREATE INDEX "sessions_expiry" ON "sessions" USING btree ("expires_at");--> statement-breakpoint
CREATE INDEX "audit_log_at" ON "audit_log" USING btree ("at");--> statement-breakpoint
CREATE UNIQUE INDEX "wire_products_material_diameter" ON "wire_products" USING btree ("material","wire_diameter_mm");--> statement-breakpoint
CREATE INDEX "order_events_order" ON "order_events" USING btree ("order_id","id");--> statement-breakpoint
CREATE INDEX "orders_state_created" ON "orders" USING btree ("state","created_at","id");--> statement-breakpoint
CREATE INDEX "orders_company" ON "orders" USING btree ("company_id","created_at");--> statement-breakpoint
CREATE INDEX "orders_contact_email" ON "orders" USING btree ("contact_email");--> statement-breakpoint
CREATE INDEX "orders_person" ON "orders" USING btree ("person_id");--> statement-breakpoint
CREATE UNIQUE INDEX "quote_lines_code" ON "quote_lines" USING btree ("quote_price_id","code");--> statement-breakpoint
CREATE UNIQUE INDEX "quote_prices_quantity" ON "quote_prices" USING btree ("quote_id","quantity");--> statement-breakpoint
CREATE UNIQUE INDEX "quotes_order_revision" ON "quotes" USING btree ("order_id","revision");--> statement-breakpoint
CREATE UNIQUE INDEX "quotes_one_draft" ON "quotes" USING btree ("order_id") WHERE "quotes"."state" = 'draft';--> statement-breakpoint
CREATE UNIQUE INDEX "quotes_one_sent" ON "quotes" USING btree ("order_id") WHERE "quotes"."state" = 'sent';--> statement-breakpoint
CREATE INDEX "ledger_entries_transaction" ON "ledger_entries" USING btree ("transaction_id");--> statement-breakpoint
CREATE INDEX "ledger_entries_account" ON "ledger_entries" USING btree ("account");--> statement-breakpoint
CREATE INDEX "ledger_transactions_order" ON "ledger_transactions" USING btree ("order_id");--> statement-breakpoint
CREATE UNIQUE INDEX "payments_attempt" ON "payments" USING btree ("order_id","kind","attempt");--> statement-breakpoint
CREATE UNIQUE INDEX "payments_one_open" ON "payments" USING btree ("order_id","kind") WHERE "payments"."state" in ('opening', 'open', 'processing');--> statement-breakpoint
CREATE UNIQUE INDEX "payments_one_paid" ON "payments" USING btree ("order_id","kind") WHERE "payments"."state" = 'paid';--> statement-breakpoint
CREATE INDEX "payments_unfinished" ON "payments" USING btree ("created_at") WHERE "payments"."state" in ('opening', 'open', 'processing');--> statement-breakpoint
CREATE INDEX "stripe_events_waiting" ON "stripe_events" USING btree ("run_at","id") WHERE "stripe_events"."state" = 'waiting';--> statement-breakpoint
CREATE INDEX "bench_records_operation" ON "bench_records" USING btree ("operation_id","at");--> statement-breakpoint
CREATE INDEX "jobs_state_created" ON "jobs" USING btree ("state","created_at");--> statement-breakpoint
CREATE UNIQUE INDEX "operations_position" ON "operations" USING btree ("job_id","position");--> statement-breakpoint
CREATE INDEX "operations_centre" ON "operations" USING btree ("work_centre_id","state");--> statement-breakpoint
CREATE INDEX "wire_reservations_product" ON "wire_reservations" USING btree ("wire_product_id");--> statement-breakpoint
CREATE UNIQUE INDEX "outbox_once" ON "outbox" USING btree ("kind","object_id","recipient","step");--> statement-breakpoint
CREATE INDEX "outbox_due" ON "outbox" USING btree ("run_at","id") WHERE "outbox"."sent_at" is null and "outbox"."dead_at" is null and "outbox"."skipped_at" is null;--> statement-breakpoint
CREATE INDEX "outbox_order" ON "outbox" USING btree ("order_id","created_at");