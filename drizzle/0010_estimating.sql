CREATE TYPE "public"."price_book_state" AS ENUM('draft', 'approved');--> statement-breakpoint
CREATE TYPE "public"."file_kind" AS ENUM('pdf', 'png', 'jpeg', 'dxf', 'step');--> statement-breakpoint
CREATE TYPE "public"."file_state" AS ENUM('receiving', 'received', 'checked', 'refused');--> statement-breakpoint
CREATE TABLE "gate_policies" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"number" integer NOT NULL,
	"words" text DEFAULT '' NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"created_by" uuid,
	CONSTRAINT "gate_policies_number_unique" UNIQUE("number")
);
--> statement-breakpoint
CREATE TABLE "gate_rules" (
	"policy_id" uuid NOT NULL,
	"code" text NOT NULL,
	"is_on" boolean NOT NULL,
	"value" numeric(16, 6),
	"customer_text" text NOT NULL,
	"estimator_text" text NOT NULL,
	CONSTRAINT "gate_rules_policy_id_code_pk" PRIMARY KEY("policy_id","code"),
	CONSTRAINT "gate_rules_texts" CHECK (length("gate_rules"."customer_text") > 0 and length("gate_rules"."estimator_text") > 0)
);
--> statement-breakpoint
CREATE TABLE "order_messages" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"order_id" uuid NOT NULL,
	"from_customer" boolean NOT NULL,
	"person_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"text" text NOT NULL,
	CONSTRAINT "order_messages_text" CHECK (length("order_messages"."text") between 1 and 4000),
	CONSTRAINT "order_messages_author" CHECK ("order_messages"."from_customer" or "order_messages"."person_id" is not null)
);
--> statement-breakpoint
CREATE TABLE "order_notes" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"order_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"text" text NOT NULL,
	CONSTRAINT "order_notes_text" CHECK (length("order_notes"."text") between 1 and 4000)
);
--> statement-breakpoint
CREATE TABLE "order_viewers" (
	"order_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"seen_at" timestamp with time zone NOT NULL,
	CONSTRAINT "order_viewers_order_id_person_id_pk" PRIMARY KEY("order_id","person_id")
);
--> statement-breakpoint
CREATE TABLE "files" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"order_id" uuid,
	"draft_hash" "bytea",
	"name" text NOT NULL,
	"kind" "file_kind" NOT NULL,
	"state" "file_state" DEFAULT 'receiving' NOT NULL,
	"size_bytes" bigint NOT NULL,
	"received_bytes" bigint DEFAULT 0 NOT NULL,
	"sha256" "bytea",
	"storage_key" text NOT NULL,
	"refusal" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"checked_at" timestamp with time zone,
	CONSTRAINT "files_storage_key_unique" UNIQUE("storage_key"),
	CONSTRAINT "files_size" CHECK ("files"."size_bytes" between 1 and 20000000 and "files"."received_bytes" between 0 and "files"."size_bytes"),
	CONSTRAINT "files_reachable" CHECK ("files"."order_id" is not null or "files"."draft_hash" is not null),
	CONSTRAINT "files_checked" CHECK ("files"."state" <> 'checked' or ("files"."checked_at" is not null and "files"."sha256" is not null and "files"."received_bytes" = "files"."size_bytes"))
);
--> statement-breakpoint
ALTER TABLE "price_books" ALTER COLUMN "in_force_from" DROP NOT NULL;--> statement-breakpoint
ALTER TABLE "price_books" ADD COLUMN "state" "price_book_state" DEFAULT 'approved' NOT NULL;--> statement-breakpoint
ALTER TABLE "price_books" ADD COLUMN "version" integer DEFAULT 1 NOT NULL;--> statement-breakpoint
ALTER TABLE "price_books" ADD COLUMN "words" text DEFAULT '' NOT NULL;--> statement-breakpoint
ALTER TABLE "price_books" ADD COLUMN "created_by" uuid;--> statement-breakpoint
ALTER TABLE "price_books" ADD COLUMN "approved_at" timestamp with time zone;--> statement-breakpoint
ALTER TABLE "price_books" ADD COLUMN "approved_by" uuid;--> statement-breakpoint
ALTER TABLE "orders" ADD COLUMN "parent_id" uuid;--> statement-breakpoint
ALTER TABLE "orders" ADD COLUMN "position" integer;--> statement-breakpoint
ALTER TABLE "quote_prices" ADD COLUMN "computed_dispatch_on" date;--> statement-breakpoint
ALTER TABLE "quote_prices" ADD COLUMN "dispatch_reason" text;--> statement-breakpoint
ALTER TABLE "quote_prices" ADD COLUMN "dispatch_changed_by" uuid;--> statement-breakpoint
ALTER TABLE "quotes" ADD COLUMN "computed_design" jsonb;--> statement-breakpoint
ALTER TABLE "quotes" ADD COLUMN "design_reason" text;--> statement-breakpoint
ALTER TABLE "quotes" ADD COLUMN "design_changed_by" uuid;--> statement-breakpoint
ALTER TABLE "quotes" ADD COLUMN "renews_quote_id" uuid;--> statement-breakpoint
ALTER TABLE "quotes" ADD COLUMN "approval_asked_at" timestamp with time zone;--> statement-breakpoint
ALTER TABLE "quotes" ADD COLUMN "approval_asked_by" uuid;--> statement-breakpoint
ALTER TABLE "quotes" ADD COLUMN "approval_reason" text;--> statement-breakpoint
ALTER TABLE "quotes" ADD COLUMN "approved_at" timestamp with time zone;--> statement-breakpoint
ALTER TABLE "quotes" ADD COLUMN "approved_by" uuid;--> statement-breakpoint
ALTER TABLE "gate_policies" ADD CONSTRAINT "gate_policies_created_by_people_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "gate_rules" ADD CONSTRAINT "gate_rules_policy_id_gate_policies_id_fk" FOREIGN KEY ("policy_id") REFERENCES "public"."gate_policies"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_messages" ADD CONSTRAINT "order_messages_order_id_orders_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."orders"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_messages" ADD CONSTRAINT "order_messages_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_notes" ADD CONSTRAINT "order_notes_order_id_orders_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."orders"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_notes" ADD CONSTRAINT "order_notes_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_viewers" ADD CONSTRAINT "order_viewers_order_id_orders_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."orders"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_viewers" ADD CONSTRAINT "order_viewers_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "files" ADD CONSTRAINT "files_order_id_orders_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."orders"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "order_messages_order" ON "order_messages" USING btree ("order_id","created_at","id");--> statement-breakpoint
CREATE INDEX "order_notes_order" ON "order_notes" USING btree ("order_id","created_at","id");--> statement-breakpoint
CREATE INDEX "order_viewers_seen" ON "order_viewers" USING btree ("seen_at");--> statement-breakpoint
CREATE INDEX "files_order" ON "files" USING btree ("order_id","created_at");--> statement-breakpoint
CREATE INDEX "files_draft" ON "files" USING btree ("draft_hash");--> statement-breakpoint
CREATE INDEX "files_unattached" ON "files" USING btree ("created_at") WHERE "files"."order_id" is null;--> statement-breakpoint
ALTER TABLE "price_books" ADD CONSTRAINT "price_books_created_by_people_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "price_books" ADD CONSTRAINT "price_books_approved_by_people_id_fk" FOREIGN KEY ("approved_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "orders" ADD CONSTRAINT "orders_parent_id_orders_id_fk" FOREIGN KEY ("parent_id") REFERENCES "public"."orders"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "quote_prices" ADD CONSTRAINT "quote_prices_dispatch_changed_by_people_id_fk" FOREIGN KEY ("dispatch_changed_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "quotes" ADD CONSTRAINT "quotes_design_changed_by_people_id_fk" FOREIGN KEY ("design_changed_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "quotes" ADD CONSTRAINT "quotes_renews_quote_id_quotes_id_fk" FOREIGN KEY ("renews_quote_id") REFERENCES "public"."quotes"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "quotes" ADD CONSTRAINT "quotes_approval_asked_by_people_id_fk" FOREIGN KEY ("approval_asked_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "quotes" ADD CONSTRAINT "quotes_approved_by_people_id_fk" FOREIGN KEY ("approved_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "price_books_in_force" ON "price_books" USING btree ("in_force_from","number") WHERE "price_books"."state" = 'approved';--> statement-breakpoint
CREATE UNIQUE INDEX "orders_line" ON "orders" USING btree ("parent_id","position");--> statement-breakpoint
ALTER TABLE "price_books" ADD CONSTRAINT "price_books_approved" CHECK ("price_books"."state" <> 'approved' or "price_books"."in_force_from" is not null);--> statement-breakpoint
ALTER TABLE "orders" ADD CONSTRAINT "orders_line_placed" CHECK (("orders"."parent_id" is null) = ("orders"."position" is null) and "orders"."parent_id" is distinct from "orders"."id");--> statement-breakpoint
ALTER TABLE "quote_prices" ADD CONSTRAINT "quote_prices_dispatch_changed" CHECK (("quote_prices"."dispatch_reason" is null and "quote_prices"."dispatch_changed_by" is null) or (length("quote_prices"."dispatch_reason") > 0 and "quote_prices"."dispatch_changed_by" is not null and "quote_prices"."dispatch_on" is not null));--> statement-breakpoint
ALTER TABLE "quotes" ADD CONSTRAINT "quotes_design_changed" CHECK (("quotes"."design_reason" is null and "quotes"."design_changed_by" is null) or (length("quotes"."design_reason") > 0 and "quotes"."design_changed_by" is not null and "quotes"."design" is not null));--> statement-breakpoint
ALTER TABLE "quotes" ADD CONSTRAINT "quotes_approval" CHECK (("quotes"."approval_asked_at" is null) = ("quotes"."approval_reason" is null) and ("quotes"."approved_at" is null) = ("quotes"."approved_by" is null));--> statement-breakpoint
CREATE TRIGGER order_notes_append_only BEFORE UPDATE OR DELETE ON "order_notes" FOR EACH ROW EXECUTE FUNCTION refuse_change();--> statement-breakpoint
CREATE TRIGGER order_messages_append_only BEFORE UPDATE OR DELETE ON "order_messages" FOR EACH ROW EXECUTE FUNCTION refuse_change();
