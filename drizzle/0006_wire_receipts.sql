CREATE TABLE "wire_receipts" (
	"id" uuid PRIMARY KEY NOT NULL,
	"wire_product_id" uuid NOT NULL,
	"mass_kg" numeric(12, 3) NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"person_id" uuid NOT NULL,
	"note" text DEFAULT '' NOT NULL,
	CONSTRAINT "wire_receipts_positive" CHECK ("wire_receipts"."mass_kg" > 0)
);
--> statement-breakpoint
ALTER TABLE "wire_receipts" ADD CONSTRAINT "wire_receipts_wire_product_id_wire_products_id_fk" FOREIGN KEY ("wire_product_id") REFERENCES "public"."wire_products"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "wire_receipts" ADD CONSTRAINT "wire_receipts_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "wire_receipts_product" ON "wire_receipts" USING btree ("wire_product_id","at");--> statement-breakpoint
CREATE TRIGGER wire_receipts_append_only BEFORE UPDATE OR DELETE ON "wire_receipts" FOR EACH ROW EXECUTE FUNCTION refuse_change();
