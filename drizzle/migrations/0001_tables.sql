CREATE TABLE "api_key" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"prefix" text NOT NULL,
	"last_four" text NOT NULL,
	"key_hash" text NOT NULL,
	"scopes" text[] NOT NULL,
	"created_by" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp (3) with time zone,
	"last_used_at" timestamp (3) with time zone,
	"revoked_at" timestamp (3) with time zone,
	CONSTRAINT "api_key_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "api_key_key_hash_unique" UNIQUE("key_hash")
);
--> statement-breakpoint
ALTER TABLE "api_key" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "idempotency_key" (
	"shop_id" uuid NOT NULL,
	"caller" uuid NOT NULL,
	"operation" text NOT NULL,
	"key" text NOT NULL,
	"request_hash" text NOT NULL,
	"result" jsonb NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "idempotency_key_once" UNIQUE("shop_id","caller","operation","key")
);
--> statement-breakpoint
ALTER TABLE "idempotency_key" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "screen" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"paired_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"last_seen_at" timestamp (3) with time zone,
	"revoked_at" timestamp (3) with time zone,
	CONSTRAINT "screen_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
ALTER TABLE "screen" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "batch" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"code" text NOT NULL,
	"design_id" uuid NOT NULL,
	"route_id" uuid NOT NULL,
	"boards" integer NOT NULL,
	"due_date" date,
	"ship_by" date,
	"released_at" timestamp (3) with time zone,
	"shipped_at" timestamp (3) with time zone,
	"assigned_to" uuid,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "batch_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "batch_code" UNIQUE("shop_id","code")
);
--> statement-breakpoint
ALTER TABLE "batch" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "board" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"batch_id" uuid NOT NULL,
	"serial" integer NOT NULL,
	CONSTRAINT "board_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "board_serial" UNIQUE("shop_id","serial")
);
--> statement-breakpoint
ALTER TABLE "board" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "hold_override" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"batch_id" uuid NOT NULL,
	"step" text NOT NULL,
	"piece" integer NOT NULL,
	"by" uuid NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"reason" text NOT NULL,
	"seen_at" timestamp (3) with time zone,
	CONSTRAINT "hold_override_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
ALTER TABLE "hold_override" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "occupation" (
	"shop_id" uuid NOT NULL,
	"batch_id" uuid NOT NULL,
	"resource" text NOT NULL,
	"is_clamps" boolean NOT NULL,
	"amount" integer NOT NULL,
	"step" text NOT NULL,
	"piece" integer NOT NULL,
	"since" timestamp (3) with time zone NOT NULL,
	"until" timestamp (3) with time zone,
	CONSTRAINT "occupation_shop_id_batch_id_resource_step_piece_since_pk" PRIMARY KEY("shop_id","batch_id","resource","step","piece","since")
);
--> statement-breakpoint
ALTER TABLE "occupation" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "rework_reason" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"batch_id" uuid NOT NULL,
	"reason" text NOT NULL,
	CONSTRAINT "rework_reason_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
ALTER TABLE "rework_reason" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "route_copy" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"hash" text NOT NULL,
	"steps" jsonb NOT NULL,
	CONSTRAINT "route_copy_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "route_copy_hash" UNIQUE("shop_id","hash")
);
--> statement-breakpoint
ALTER TABLE "route_copy" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "step_run" (
	"shop_id" uuid NOT NULL,
	"batch_id" uuid NOT NULL,
	"step" text NOT NULL,
	"piece" integer NOT NULL,
	"started_at" timestamp (3) with time zone,
	"started_by" uuid,
	"finished_at" timestamp (3) with time zone,
	"finished_by" uuid,
	"cut_at" timestamp (3) with time zone,
	"cut_by" uuid,
	CONSTRAINT "step_run_shop_id_batch_id_step_piece_pk" PRIMARY KEY("shop_id","batch_id","step","piece")
);
--> statement-breakpoint
ALTER TABLE "step_run" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "design" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"name" text NOT NULL,
	"length" bigint NOT NULL,
	"width" bigint NOT NULL,
	"thickness" bigint NOT NULL,
	"strips" jsonb NOT NULL,
	"slices" integer NOT NULL,
	"panel_count" integer NOT NULL,
	"panel_boards" integer NOT NULL,
	"blocks_per_board" integer NOT NULL,
	"panel_clamp_count" integer NOT NULL,
	"panel_clamp_length" bigint NOT NULL,
	"block_clamp_count" integer NOT NULL,
	"block_clamp_length" bigint NOT NULL,
	CONSTRAINT "design_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "design_name" UNIQUE("shop_id","name")
);
--> statement-breakpoint
ALTER TABLE "design" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "event" (
	"shop_id" uuid NOT NULL,
	"seq" integer NOT NULL,
	"type" text NOT NULL,
	"by" uuid,
	"happened_at" timestamp (3) with time zone NOT NULL,
	"recorded_at" timestamp (3) with time zone NOT NULL,
	"batch_id" uuid,
	"order_id" uuid,
	"data" jsonb NOT NULL,
	CONSTRAINT "event_shop_id_seq_pk" PRIMARY KEY("shop_id","seq")
);
--> statement-breakpoint
ALTER TABLE "event" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "relay_cursor" (
	"shop_id" uuid PRIMARY KEY NOT NULL,
	"seq" integer NOT NULL
);
--> statement-breakpoint
ALTER TABLE "relay_cursor" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "member" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"person_id" uuid,
	"name" text NOT NULL,
	"initials" text NOT NULL,
	"roles" text[] NOT NULL,
	"skills" text[] NOT NULL,
	"weekly" jsonb,
	"exceptions" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"active" boolean DEFAULT true NOT NULL,
	CONSTRAINT "member_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
ALTER TABLE "member" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "customer" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"email" text,
	CONSTRAINT "customer_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
ALTER TABLE "customer" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "line_batch" (
	"shop_id" uuid NOT NULL,
	"line_id" uuid NOT NULL,
	"batch_id" uuid NOT NULL,
	"boards" integer NOT NULL,
	CONSTRAINT "line_batch_shop_id_line_id_batch_id_pk" PRIMARY KEY("shop_id","line_id","batch_id")
);
--> statement-breakpoint
ALTER TABLE "line_batch" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "order_line" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"order_id" uuid NOT NULL,
	"design_id" uuid NOT NULL,
	"count" integer NOT NULL,
	"position" integer NOT NULL,
	CONSTRAINT "order_line_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
ALTER TABLE "order_line" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "shop_order" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"code" text NOT NULL,
	"customer_id" uuid NOT NULL,
	"client_reference" text,
	"due_date" date NOT NULL,
	"ship_by" date NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "shop_order_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "order_code" UNIQUE("shop_id","code"),
	CONSTRAINT "order_client_reference" UNIQUE("shop_id","client_reference")
);
--> statement-breakpoint
ALTER TABLE "shop_order" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "pairing" (
	"secret_hash" text PRIMARY KEY NOT NULL,
	"code" text NOT NULL,
	"expires_at" timestamp (3) with time zone NOT NULL,
	"shop_id" uuid,
	"screen_id" uuid,
	"delivered_at" timestamp (3) with time zone,
	CONSTRAINT "pairing_code_unique" UNIQUE("code")
);
--> statement-breakpoint
ALTER TABLE "pairing" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "pairing_attempt" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"member_id" uuid NOT NULL,
	"at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "pairing_attempt" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "person" (
	"id" uuid PRIMARY KEY NOT NULL,
	"email" text NOT NULL,
	"password_hash" text NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "person" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "sign_in_failure" (
	"address_hash" text PRIMARY KEY NOT NULL,
	"failures" integer NOT NULL,
	"not_before" timestamp (3) with time zone,
	"last_at" timestamp (3) with time zone NOT NULL
);
--> statement-breakpoint
ALTER TABLE "sign_in_failure" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "session" (
	"id" uuid PRIMARY KEY NOT NULL,
	"token_hash" text NOT NULL,
	"person_id" uuid NOT NULL,
	"shop_id" uuid NOT NULL,
	"device" text NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"last_seen_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "session_token_hash_unique" UNIQUE("token_hash")
);
--> statement-breakpoint
ALTER TABLE "session" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "signing_key" (
	"id" text PRIMARY KEY NOT NULL,
	"sealed" text NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "signing_key" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "forecast" (
	"shop_id" uuid NOT NULL,
	"batch_id" uuid NOT NULL,
	"plan_version" integer NOT NULL,
	"ready_at" timestamp (3) with time zone NOT NULL,
	"next_start_at" timestamp (3) with time zone,
	"slack_minutes" integer,
	"slack_days" integer,
	CONSTRAINT "forecast_shop_id_batch_id_pk" PRIMARY KEY("shop_id","batch_id")
);
--> statement-breakpoint
ALTER TABLE "forecast" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "plan" (
	"shop_id" uuid NOT NULL,
	"version" integer NOT NULL,
	"made_at" timestamp (3) with time zone NOT NULL,
	"seq" integer NOT NULL,
	"steps" jsonb NOT NULL,
	"unplanned" jsonb NOT NULL,
	CONSTRAINT "plan_shop_id_version_pk" PRIMARY KEY("shop_id","version")
);
--> statement-breakpoint
ALTER TABLE "plan" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "reading" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"temperature_tenths_c" integer NOT NULL,
	"humidity_percent" integer,
	CONSTRAINT "reading_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
ALTER TABLE "reading" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "clamp_class" (
	"shop_id" uuid NOT NULL,
	"key" text NOT NULL,
	"length" bigint NOT NULL,
	"count" integer NOT NULL,
	CONSTRAINT "clamp_class_shop_id_key_pk" PRIMARY KEY("shop_id","key")
);
--> statement-breakpoint
ALTER TABLE "clamp_class" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "profile" (
	"shop_id" uuid NOT NULL,
	"key" text NOT NULL,
	"kind" text NOT NULL,
	"usual" boolean NOT NULL,
	"figures" jsonb NOT NULL,
	CONSTRAINT "profile_shop_id_key_pk" PRIMARY KEY("shop_id","key")
);
--> statement-breakpoint
ALTER TABLE "profile" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "shop" (
	"id" uuid PRIMARY KEY NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"name" text NOT NULL,
	"zone" text NOT NULL,
	"length_unit" text DEFAULT 'MILLIMETRE' NOT NULL,
	"currency" text DEFAULT 'EUR' NOT NULL,
	"weekly" jsonb NOT NULL,
	"exceptions" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"skills" jsonb NOT NULL,
	"route" jsonb NOT NULL,
	"transit_days" integer DEFAULT 2 NOT NULL,
	"packing_days" integer DEFAULT 1 NOT NULL,
	"batch_prefix" text DEFAULT 'CT' NOT NULL,
	"demo_made_at" timestamp (3) with time zone,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "shop" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "shop_counter" (
	"shop_id" uuid PRIMARY KEY NOT NULL,
	"seq" integer DEFAULT 0 NOT NULL,
	"batch_code" integer DEFAULT 0 NOT NULL,
	"order_code" integer DEFAULT 1000 NOT NULL,
	"board_serial" integer DEFAULT 0 NOT NULL
);
--> statement-breakpoint
ALTER TABLE "shop_counter" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "station" (
	"shop_id" uuid NOT NULL,
	"key" text NOT NULL,
	"name" text NOT NULL,
	"unit" text NOT NULL,
	"capacity" integer NOT NULL,
	"position" integer NOT NULL,
	CONSTRAINT "station_shop_id_key_pk" PRIMARY KEY("shop_id","key")
);
--> statement-breakpoint
ALTER TABLE "station" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "api_key" ADD CONSTRAINT "api_key_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "idempotency_key" ADD CONSTRAINT "idempotency_key_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "screen" ADD CONSTRAINT "screen_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "batch" ADD CONSTRAINT "batch_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "batch" ADD CONSTRAINT "batch_shop_id_design_id_design_shop_id_id_fk" FOREIGN KEY ("shop_id","design_id") REFERENCES "public"."design"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "batch" ADD CONSTRAINT "batch_shop_id_route_id_route_copy_shop_id_id_fk" FOREIGN KEY ("shop_id","route_id") REFERENCES "public"."route_copy"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "batch" ADD CONSTRAINT "batch_shop_id_assigned_to_member_shop_id_id_fk" FOREIGN KEY ("shop_id","assigned_to") REFERENCES "public"."member"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "board" ADD CONSTRAINT "board_shop_id_batch_id_batch_shop_id_id_fk" FOREIGN KEY ("shop_id","batch_id") REFERENCES "public"."batch"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "hold_override" ADD CONSTRAINT "hold_override_shop_id_batch_id_batch_shop_id_id_fk" FOREIGN KEY ("shop_id","batch_id") REFERENCES "public"."batch"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "occupation" ADD CONSTRAINT "occupation_shop_id_batch_id_batch_shop_id_id_fk" FOREIGN KEY ("shop_id","batch_id") REFERENCES "public"."batch"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rework_reason" ADD CONSTRAINT "rework_reason_shop_id_batch_id_batch_shop_id_id_fk" FOREIGN KEY ("shop_id","batch_id") REFERENCES "public"."batch"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "route_copy" ADD CONSTRAINT "route_copy_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "step_run" ADD CONSTRAINT "step_run_shop_id_batch_id_batch_shop_id_id_fk" FOREIGN KEY ("shop_id","batch_id") REFERENCES "public"."batch"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "design" ADD CONSTRAINT "design_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "member" ADD CONSTRAINT "member_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "customer" ADD CONSTRAINT "customer_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "line_batch" ADD CONSTRAINT "line_batch_shop_id_line_id_order_line_shop_id_id_fk" FOREIGN KEY ("shop_id","line_id") REFERENCES "public"."order_line"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "line_batch" ADD CONSTRAINT "line_batch_shop_id_batch_id_batch_shop_id_id_fk" FOREIGN KEY ("shop_id","batch_id") REFERENCES "public"."batch"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_line" ADD CONSTRAINT "order_line_shop_id_order_id_shop_order_shop_id_id_fk" FOREIGN KEY ("shop_id","order_id") REFERENCES "public"."shop_order"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_line" ADD CONSTRAINT "order_line_shop_id_design_id_design_shop_id_id_fk" FOREIGN KEY ("shop_id","design_id") REFERENCES "public"."design"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "shop_order" ADD CONSTRAINT "shop_order_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "shop_order" ADD CONSTRAINT "shop_order_shop_id_customer_id_customer_shop_id_id_fk" FOREIGN KEY ("shop_id","customer_id") REFERENCES "public"."customer"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "session" ADD CONSTRAINT "session_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "forecast" ADD CONSTRAINT "forecast_shop_id_batch_id_batch_shop_id_id_fk" FOREIGN KEY ("shop_id","batch_id") REFERENCES "public"."batch"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "plan" ADD CONSTRAINT "plan_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reading" ADD CONSTRAINT "reading_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "clamp_class" ADD CONSTRAINT "clamp_class_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "profile" ADD CONSTRAINT "profile_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "shop_counter" ADD CONSTRAINT "shop_counter_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "station" ADD CONSTRAINT "station_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "screen_id" ON "screen" USING btree ("id");--> statement-breakpoint
CREATE INDEX "batch_open" ON "batch" USING btree ("shop_id") WHERE shipped_at is null;--> statement-breakpoint
CREATE INDEX "hold_override_batch" ON "hold_override" USING btree ("shop_id","batch_id");--> statement-breakpoint
CREATE INDEX "occupation_open" ON "occupation" USING btree ("shop_id") WHERE until is null;--> statement-breakpoint
CREATE INDEX "event_batch" ON "event" USING btree ("shop_id","batch_id","seq");--> statement-breakpoint
CREATE INDEX "member_person" ON "member" USING btree ("person_id");--> statement-breakpoint
CREATE INDEX "line_batch_batch" ON "line_batch" USING btree ("shop_id","batch_id");--> statement-breakpoint
CREATE INDEX "order_line_order" ON "order_line" USING btree ("shop_id","order_id");--> statement-breakpoint
CREATE INDEX "order_due" ON "shop_order" USING btree ("shop_id","due_date","id");--> statement-breakpoint
CREATE INDEX "pairing_attempt_member" ON "pairing_attempt" USING btree ("member_id","at");--> statement-breakpoint
CREATE UNIQUE INDEX "person_email" ON "person" USING btree (lower("email"));--> statement-breakpoint
CREATE INDEX "sign_in_failure_last" ON "sign_in_failure" USING btree ("last_at");--> statement-breakpoint
CREATE INDEX "session_person" ON "session" USING btree ("person_id");--> statement-breakpoint
CREATE INDEX "reading_at" ON "reading" USING btree ("shop_id","at");--> statement-breakpoint
CREATE POLICY "shop_wall" ON "api_key" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "idempotency_key" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "screen" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "batch" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "board" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "hold_override" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "occupation" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "rework_reason" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "route_copy" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "step_run" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "design" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "event" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "relay_reads" ON "event" AS PERMISSIVE FOR SELECT TO "clamptide_relay" USING (true);--> statement-breakpoint
CREATE POLICY "relay_keeps" ON "relay_cursor" AS PERMISSIVE FOR ALL TO "clamptide_relay" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "shop_wall" ON "member" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "customer" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "line_batch" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "order_line" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "shop_order" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "forecast" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "plan" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "reading" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "clamp_class" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "profile" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "shop" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (id = (select current_shop())) WITH CHECK (id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "shop_wall" ON "shop_counter" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));--> statement-breakpoint
CREATE POLICY "relay_reads" ON "shop_counter" AS PERMISSIVE FOR SELECT TO "clamptide_relay" USING (true);--> statement-breakpoint
CREATE POLICY "shop_wall" ON "station" AS PERMISSIVE FOR ALL TO "clamptide_shop" USING (shop_id = (select current_shop())) WITH CHECK (shop_id = (select current_shop()));