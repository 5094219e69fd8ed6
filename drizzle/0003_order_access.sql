CREATE TABLE "order_access" (
	"token_hash" "bytea" PRIMARY KEY NOT NULL,
	"order_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"revoked_at" timestamp with time zone
);
--> statement-breakpoint
ALTER TABLE "order_access" ADD CONSTRAINT "order_access_order_id_orders_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."orders"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "order_access_order" ON "order_access" USING btree ("order_id");--> statement-breakpoint
ALTER TABLE "orders" DROP COLUMN "access_hash";