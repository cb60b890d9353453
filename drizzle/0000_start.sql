CREATE TABLE "check_ins" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"member_id" uuid NOT NULL,
	"week_start" date NOT NULL,
	"sent_at" timestamp with time zone NOT NULL,
	"words" text NOT NULL,
	"went" smallint NOT NULL,
	"sleep" smallint NOT NULL,
	"soreness" smallint NOT NULL,
	"effort" smallint NOT NULL,
	"pain" text DEFAULT 'none' NOT NULL,
	"pain_where" text,
	"photo_id" uuid,
	"answered_at" timestamp with time zone,
	"answered_by" uuid,
	CONSTRAINT "check_ins_week" UNIQUE("member_id","week_start"),
	CONSTRAINT "check_ins_scales" CHECK ("check_ins"."went" between 1 and 5 and "check_ins"."sleep" between 1 and 5 and "check_ins"."soreness" between 1 and 5 and "check_ins"."effort" between 1 and 10),
	CONSTRAINT "check_ins_words" CHECK (length("check_ins"."words") between 1 and 4000),
	CONSTRAINT "check_ins_pain_known" CHECK ("check_ins"."pain" in ('none', 'mild', 'strong'))
);
--> statement-breakpoint
CREATE TABLE "drafts" (
	"user_id" uuid NOT NULL,
	"key" text NOT NULL,
	"body" jsonb NOT NULL,
	"saved_at" timestamp with time zone NOT NULL,
	CONSTRAINT "drafts_user_id_key_pk" PRIMARY KEY("user_id","key")
);
--> statement-breakpoint
CREATE TABLE "messages" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"member_id" uuid NOT NULL,
	"author_id" uuid,
	"by_coach" boolean NOT NULL,
	"sent_at" timestamp with time zone NOT NULL,
	"words" text NOT NULL,
	"check_in_id" uuid,
	"lesson_slug" text,
	"lesson_place" text,
	"read_at" timestamp with time zone,
	CONSTRAINT "messages_words" CHECK (length("messages"."words") between 1 and 4000)
);
--> statement-breakpoint
CREATE TABLE "photos" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"member_id" uuid NOT NULL,
	"object_key" text NOT NULL,
	"state" text DEFAULT 'waiting' NOT NULL,
	"width_px" integer,
	"height_px" integer,
	"bytes" integer NOT NULL,
	"created_at" timestamp with time zone NOT NULL,
	CONSTRAINT "photos_objectKey_unique" UNIQUE("object_key"),
	CONSTRAINT "photos_state_known" CHECK ("photos"."state" in ('waiting', 'ready', 'refused'))
);
--> statement-breakpoint
CREATE TABLE "invoices" (
	"id" text PRIMARY KEY NOT NULL,
	"member_id" uuid NOT NULL,
	"subscription_id" text,
	"number" text,
	"status" text NOT NULL,
	"amount_minor" integer NOT NULL,
	"paid_minor" integer DEFAULT 0 NOT NULL,
	"currency" text NOT NULL,
	"issued_at" timestamp with time zone NOT NULL,
	"paid_at" timestamp with time zone,
	"page_url" text,
	CONSTRAINT "invoices_paid_bounds" CHECK ("invoices"."paid_minor" between 0 and "invoices"."amount_minor")
);
--> statement-breakpoint
CREATE TABLE "plans" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"slug" text NOT NULL,
	"name" text NOT NULL,
	"summary" text NOT NULL,
	"interval" text NOT NULL,
	"amount_minor" integer NOT NULL,
	"currency" text DEFAULT 'gbp' NOT NULL,
	"trial_days" smallint DEFAULT 0 NOT NULL,
	"stripe_product_id" text,
	"stripe_price_id" text,
	"position" smallint DEFAULT 0 NOT NULL,
	"on_sale" boolean DEFAULT true NOT NULL,
	"created_at" timestamp with time zone NOT NULL,
	CONSTRAINT "plans_slug_unique" UNIQUE("slug"),
	CONSTRAINT "plans_stripePriceId_unique" UNIQUE("stripe_price_id"),
	CONSTRAINT "plans_interval_known" CHECK ("plans"."interval" in ('month', 'year')),
	CONSTRAINT "plans_amount_positive" CHECK ("plans"."amount_minor" > 0),
	CONSTRAINT "plans_trial_bounds" CHECK ("plans"."trial_days" between 0 and 60),
	CONSTRAINT "plans_currency_shape" CHECK ("plans"."currency" ~ '^[a-z]{3}$')
);
--> statement-breakpoint
CREATE TABLE "stripe_customers" (
	"member_id" uuid PRIMARY KEY NOT NULL,
	"customer_id" text NOT NULL,
	"created_at" timestamp with time zone NOT NULL,
	CONSTRAINT "stripe_customers_customerId_unique" UNIQUE("customer_id")
);
--> statement-breakpoint
CREATE TABLE "stripe_events" (
	"id" text PRIMARY KEY NOT NULL,
	"type" text NOT NULL,
	"object_id" text NOT NULL,
	"customer_id" text,
	"received_at" timestamp with time zone NOT NULL,
	"applied_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "subscriptions" (
	"id" text PRIMARY KEY NOT NULL,
	"member_id" uuid NOT NULL,
	"plan_id" uuid,
	"status" text NOT NULL,
	"started_at" timestamp with time zone NOT NULL,
	"trial_end" timestamp with time zone,
	"current_period_start" timestamp with time zone NOT NULL,
	"current_period_end" timestamp with time zone NOT NULL,
	"cancel_at_period_end" boolean DEFAULT false NOT NULL,
	"ended_at" timestamp with time zone,
	"past_due_since" timestamp with time zone,
	"synced_at" timestamp with time zone NOT NULL,
	CONSTRAINT "subscriptions_period" CHECK ("subscriptions"."current_period_end" >= "subscriptions"."current_period_start")
);
--> statement-breakpoint
CREATE TABLE "accounts" (
	"user_id" uuid NOT NULL,
	"type" text NOT NULL,
	"provider" text NOT NULL,
	"provider_account_id" text NOT NULL,
	"refresh_token" text,
	"access_token" text,
	"expires_at" integer,
	"token_type" text,
	"scope" text,
	"id_token" text,
	"session_state" text,
	CONSTRAINT "accounts_provider_provider_account_id_pk" PRIMARY KEY("provider","provider_account_id")
);
--> statement-breakpoint
CREATE TABLE "consents" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"user_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"wording" text NOT NULL,
	"given_at" timestamp with time zone NOT NULL,
	"withdrawn_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "holds" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"member_id" uuid NOT NULL,
	"cause" text NOT NULL,
	"reason" text NOT NULL,
	"started_at" timestamp with time zone NOT NULL,
	"opened_by" uuid,
	"ended_at" timestamp with time zone,
	"cleared_by" uuid,
	"clearance" text,
	CONSTRAINT "holds_cause_known" CHECK ("holds"."cause" in ('screen', 'warning-sign', 'pain', 'coach')),
	CONSTRAINT "holds_period" CHECK ("holds"."ended_at" is null or "holds"."ended_at" >= "holds"."started_at"),
	CONSTRAINT "holds_cleared_whole" CHECK (("holds"."ended_at" is null) = ("holds"."clearance" is null))
);
--> statement-breakpoint
CREATE TABLE "houses" (
	"member_id" uuid PRIMARY KEY NOT NULL,
	"stair_count" smallint NOT NULL,
	"step_height_mm" smallint NOT NULL,
	"rail" text NOT NULL,
	"mat_length_cm" smallint,
	"mat_width_cm" smallint,
	"margin_cm" smallint,
	"chair" boolean DEFAULT false NOT NULL,
	"chair_height_cm" smallint,
	"bar" boolean DEFAULT false NOT NULL,
	"pulse_meter" boolean DEFAULT false NOT NULL,
	"updated_at" timestamp with time zone NOT NULL,
	CONSTRAINT "houses_stairs_plausible" CHECK ("houses"."stair_count" between 0 and 60),
	CONSTRAINT "houses_step_plausible" CHECK ("houses"."step_height_mm" between 80 and 300),
	CONSTRAINT "houses_rail_known" CHECK ("houses"."rail" in ('none', 'one side', 'both sides'))
);
--> statement-breakpoint
CREATE TABLE "invites" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"email" text NOT NULL,
	"name" text NOT NULL,
	"invited_by" uuid NOT NULL,
	"created_at" timestamp with time zone NOT NULL,
	"accepted_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "members" (
	"user_id" uuid PRIMARY KEY NOT NULL,
	"coach_id" uuid,
	"joined_at" timestamp with time zone,
	"birth_date" date,
	"sex" text,
	"stature_cm" smallint,
	"about" text,
	"emphasis" text DEFAULT 'balanced' NOT NULL,
	"measures_body" boolean DEFAULT false NOT NULL,
	"wants_reminders" boolean DEFAULT true NOT NULL,
	"wants_letter" boolean DEFAULT true NOT NULL,
	"unsubscribe_token" uuid DEFAULT gen_random_uuid() NOT NULL,
	"watch" text,
	CONSTRAINT "members_unsubscribeToken_unique" UNIQUE("unsubscribe_token"),
	CONSTRAINT "members_sex_known" CHECK ("members"."sex" in ('female', 'male')),
	CONSTRAINT "members_emphasis_known" CHECK ("members"."emphasis" in ('breath', 'balanced', 'muscle')),
	CONSTRAINT "members_stature_plausible" CHECK ("members"."stature_cm" between 100 and 250)
);
--> statement-breakpoint
CREATE TABLE "readiness_screens" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"member_id" uuid NOT NULL,
	"answered_at" timestamp with time zone NOT NULL,
	"answers" jsonb NOT NULL,
	"result" text NOT NULL,
	"reasons" jsonb NOT NULL,
	"valid_until" date NOT NULL,
	CONSTRAINT "screens_result_known" CHECK ("readiness_screens"."result" in ('clear', 'gentle', 'doctor'))
);
--> statement-breakpoint
CREATE TABLE "sessions" (
	"session_token" text PRIMARY KEY NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"user_id" uuid NOT NULL,
	"expires" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"seen_at" timestamp with time zone,
	"device" text,
	CONSTRAINT "sessions_id_unique" UNIQUE("id")
);
--> statement-breakpoint
CREATE TABLE "users" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text,
	"email" text NOT NULL,
	"email_verified" timestamp with time zone,
	"image" text,
	"role" text DEFAULT 'visitor' NOT NULL,
	"time_zone" text DEFAULT 'Europe/London' NOT NULL,
	"units" text DEFAULT 'metric' NOT NULL,
	"disabled_at" timestamp with time zone,
	"created_at" timestamp with time zone NOT NULL,
	CONSTRAINT "users_role_known" CHECK ("users"."role" in ('visitor', 'member', 'coach', 'owner')),
	CONSTRAINT "users_units_known" CHECK ("users"."units" in ('metric', 'imperial')),
	CONSTRAINT "users_email_shape" CHECK ("users"."email" like '%_@_%' and length("users"."email") <= 254)
);
--> statement-breakpoint
CREATE TABLE "verification_tokens" (
	"identifier" text NOT NULL,
	"token" text NOT NULL,
	"expires" timestamp with time zone NOT NULL,
	CONSTRAINT "verification_tokens_identifier_token_pk" PRIMARY KEY("identifier","token")
);
--> statement-breakpoint
CREATE TABLE "audit_entries" (
	"id" bigint PRIMARY KEY GENERATED ALWAYS AS IDENTITY (sequence name "audit_entries_id_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1),
	"at" timestamp with time zone NOT NULL,
	"actor_id" uuid,
	"action" text NOT NULL,
	"subject_id" uuid,
	"details" jsonb DEFAULT '{}'::jsonb NOT NULL
);
--> statement-breakpoint
CREATE TABLE "idempotency_keys" (
	"user_id" uuid NOT NULL,
	"key" text NOT NULL,
	"body_hash" text NOT NULL,
	"status" integer NOT NULL,
	"reply" jsonb NOT NULL,
	"created_at" timestamp with time zone NOT NULL,
	CONSTRAINT "idempotency_keys_user_id_key_pk" PRIMARY KEY("user_id","key")
);
--> statement-breakpoint
CREATE TABLE "practice" (
	"id" integer PRIMARY KEY DEFAULT 1 NOT NULL,
	"name" text NOT NULL,
	"answer_within_hours" integer DEFAULT 24 NOT NULL,
	"time_zone" text DEFAULT 'Europe/London' NOT NULL,
	"clock_offset_seconds" bigint DEFAULT 0 NOT NULL,
	"test_clock_id" text,
	"filled_at" timestamp with time zone,
	CONSTRAINT "practice_single" CHECK ("practice"."id" = 1)
);
--> statement-breakpoint
CREATE TABLE "reminders" (
	"user_id" uuid NOT NULL,
	"about" text NOT NULL,
	"sent_at" timestamp with time zone NOT NULL,
	CONSTRAINT "reminders_user_id_about_pk" PRIMARY KEY("user_id","about")
);
--> statement-breakpoint
CREATE TABLE "alerts" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"member_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"words" text NOT NULL,
	"raised_at" timestamp with time zone NOT NULL,
	"settled_at" timestamp with time zone,
	"settled_by" uuid,
	CONSTRAINT "alerts_kind_known" CHECK ("alerts"."kind" in ('warning-sign', 'pain'))
);
--> statement-breakpoint
CREATE TABLE "flights" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"member_id" uuid NOT NULL,
	"number" smallint NOT NULL,
	"starts_on" date NOT NULL,
	"emphasis" text NOT NULL,
	"created_at" timestamp with time zone NOT NULL,
	CONSTRAINT "flights_number" UNIQUE("member_id","number"),
	CONSTRAINT "flights_number_positive" CHECK ("flights"."number" > 0),
	CONSTRAINT "flights_emphasis_known" CHECK ("flights"."emphasis" in ('breath', 'balanced', 'muscle'))
);
--> statement-breakpoint
CREATE TABLE "lesson_reads" (
	"member_id" uuid NOT NULL,
	"slug" text NOT NULL,
	"place" integer DEFAULT 0 NOT NULL,
	"opened_at" timestamp with time zone NOT NULL,
	"read_at" timestamp with time zone,
	CONSTRAINT "lesson_reads_once" UNIQUE("member_id","slug")
);
--> statement-breakpoint
CREATE TABLE "marks" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"member_id" uuid NOT NULL,
	"test_day_id" uuid,
	"test" text NOT NULL,
	"form" text,
	"value" double precision NOT NULL,
	"taken_at" timestamp with time zone NOT NULL,
	"effort" smallint,
	"pain" text DEFAULT 'none' NOT NULL,
	"conditions" text,
	"entry" text DEFAULT 'form' NOT NULL,
	"taps_ms" jsonb,
	"stair_count" smallint,
	"step_height_mm" smallint,
	"voided_at" timestamp with time zone,
	CONSTRAINT "marks_value_plausible" CHECK ("marks"."value" >= 0 and "marks"."value" < 10000 and "marks"."value" <> 'NaN'),
	CONSTRAINT "marks_effort" CHECK ("marks"."effort" between 1 and 10),
	CONSTRAINT "marks_entry_known" CHECK ("marks"."entry" in ('form', 'runner')),
	CONSTRAINT "marks_pain_known" CHECK ("marks"."pain" in ('none', 'mild', 'strong'))
);
--> statement-breakpoint
CREATE TABLE "session_items" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"session_id" uuid NOT NULL,
	"position" smallint NOT NULL,
	"movement" text NOT NULL,
	"rung" text NOT NULL,
	"sets" smallint NOT NULL,
	"amount" smallint NOT NULL,
	"unit" text NOT NULL,
	"effort_asked" smallint NOT NULL,
	"rule" text NOT NULL,
	"why" text NOT NULL,
	"ruled_rung" text,
	"ruled_sets" smallint,
	"ruled_amount" smallint,
	"overridden_by" uuid,
	"override_why" text,
	"done_total" smallint,
	"effort_done" smallint,
	"pain" text,
	CONSTRAINT "session_items_position" UNIQUE("session_id","position"),
	CONSTRAINT "session_items_sets" CHECK ("session_items"."sets" between 1 and 10),
	CONSTRAINT "session_items_amount" CHECK ("session_items"."amount" between 1 and 600),
	CONSTRAINT "session_items_unit" CHECK ("session_items"."unit" in ('reps', 'seconds', 'flights')),
	CONSTRAINT "session_items_effort" CHECK ("session_items"."effort_asked" between 1 and 10 and "session_items"."effort_done" between 1 and 10),
	CONSTRAINT "session_items_done" CHECK ("session_items"."done_total" between 0 and 6000),
	CONSTRAINT "session_items_override_whole" CHECK ("session_items"."overridden_by" is null or "session_items"."override_why" is not null)
);
--> statement-breakpoint
CREATE TABLE "target_overrides" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"member_id" uuid NOT NULL,
	"movement" text NOT NULL,
	"rung" text NOT NULL,
	"sets" smallint NOT NULL,
	"amount" smallint NOT NULL,
	"effort" smallint NOT NULL,
	"why" text NOT NULL,
	"coach_id" uuid,
	"created_at" timestamp with time zone NOT NULL,
	"taken_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "test_days" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"member_id" uuid NOT NULL,
	"flight_id" uuid,
	"week" smallint NOT NULL,
	"taken_on" date NOT NULL,
	"conditions" text,
	"finished_at" timestamp with time zone,
	"created_at" timestamp with time zone NOT NULL,
	CONSTRAINT "test_days_week" UNIQUE("flight_id","week"),
	CONSTRAINT "test_days_week_known" CHECK ("test_days"."week" in (0, 4, 8, 12))
);
--> statement-breakpoint
CREATE TABLE "training_sessions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"member_id" uuid NOT NULL,
	"flight_id" uuid NOT NULL,
	"week" smallint NOT NULL,
	"ordinal" smallint NOT NULL,
	"title" text NOT NULL,
	"planned_at" timestamp with time zone NOT NULL,
	"done_at" timestamp with time zone,
	"minutes" smallint,
	"effort" smallint,
	"pain" text,
	"pain_where" text,
	"note" text,
	"share_done" double precision,
	CONSTRAINT "training_sessions_week" CHECK ("training_sessions"."week" between 1 and 12),
	CONSTRAINT "training_sessions_ordinal" CHECK ("training_sessions"."ordinal" between 1 and 14),
	CONSTRAINT "training_sessions_effort" CHECK ("training_sessions"."effort" between 1 and 10),
	CONSTRAINT "training_sessions_minutes" CHECK ("training_sessions"."minutes" between 1 and 240),
	CONSTRAINT "training_sessions_pain" CHECK ("training_sessions"."pain" in ('none', 'mild', 'strong'))
);
--> statement-breakpoint
ALTER TABLE "check_ins" ADD CONSTRAINT "check_ins_member_id_members_user_id_fk" FOREIGN KEY ("member_id") REFERENCES "public"."members"("user_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "check_ins" ADD CONSTRAINT "check_ins_photo_id_photos_id_fk" FOREIGN KEY ("photo_id") REFERENCES "public"."photos"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "check_ins" ADD CONSTRAINT "check_ins_answered_by_users_id_fk" FOREIGN KEY ("answered_by") REFERENCES "public"."users"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "drafts" ADD CONSTRAINT "drafts_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "messages" ADD CONSTRAINT "messages_member_id_members_user_id_fk" FOREIGN KEY ("member_id") REFERENCES "public"."members"("user_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "messages" ADD CONSTRAINT "messages_author_id_users_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."users"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "messages" ADD CONSTRAINT "messages_check_in_id_check_ins_id_fk" FOREIGN KEY ("check_in_id") REFERENCES "public"."check_ins"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "photos" ADD CONSTRAINT "photos_member_id_members_user_id_fk" FOREIGN KEY ("member_id") REFERENCES "public"."members"("user_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invoices" ADD CONSTRAINT "invoices_member_id_members_user_id_fk" FOREIGN KEY ("member_id") REFERENCES "public"."members"("user_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "stripe_customers" ADD CONSTRAINT "stripe_customers_member_id_members_user_id_fk" FOREIGN KEY ("member_id") REFERENCES "public"."members"("user_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "subscriptions" ADD CONSTRAINT "subscriptions_member_id_members_user_id_fk" FOREIGN KEY ("member_id") REFERENCES "public"."members"("user_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "subscriptions" ADD CONSTRAINT "subscriptions_plan_id_plans_id_fk" FOREIGN KEY ("plan_id") REFERENCES "public"."plans"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "accounts" ADD CONSTRAINT "accounts_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "consents" ADD CONSTRAINT "consents_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "holds" ADD CONSTRAINT "holds_member_id_members_user_id_fk" FOREIGN KEY ("member_id") REFERENCES "public"."members"("user_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "holds" ADD CONSTRAINT "holds_opened_by_users_id_fk" FOREIGN KEY ("opened_by") REFERENCES "public"."users"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "holds" ADD CONSTRAINT "holds_cleared_by_users_id_fk" FOREIGN KEY ("cleared_by") REFERENCES "public"."users"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "houses" ADD CONSTRAINT "houses_member_id_members_user_id_fk" FOREIGN KEY ("member_id") REFERENCES "public"."members"("user_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invites" ADD CONSTRAINT "invites_invited_by_users_id_fk" FOREIGN KEY ("invited_by") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "members" ADD CONSTRAINT "members_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "members" ADD CONSTRAINT "members_coach_id_users_id_fk" FOREIGN KEY ("coach_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "readiness_screens" ADD CONSTRAINT "readiness_screens_member_id_members_user_id_fk" FOREIGN KEY ("member_id") REFERENCES "public"."members"("user_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sessions" ADD CONSTRAINT "sessions_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "idempotency_keys" ADD CONSTRAINT "idempotency_keys_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reminders" ADD CONSTRAINT "reminders_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "alerts" ADD CONSTRAINT "alerts_member_id_members_user_id_fk" FOREIGN KEY ("member_id") REFERENCES "public"."members"("user_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "alerts" ADD CONSTRAINT "alerts_settled_by_users_id_fk" FOREIGN KEY ("settled_by") REFERENCES "public"."users"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "flights" ADD CONSTRAINT "flights_member_id_members_user_id_fk" FOREIGN KEY ("member_id") REFERENCES "public"."members"("user_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "lesson_reads" ADD CONSTRAINT "lesson_reads_member_id_members_user_id_fk" FOREIGN KEY ("member_id") REFERENCES "public"."members"("user_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "marks" ADD CONSTRAINT "marks_member_id_members_user_id_fk" FOREIGN KEY ("member_id") REFERENCES "public"."members"("user_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "marks" ADD CONSTRAINT "marks_test_day_id_test_days_id_fk" FOREIGN KEY ("test_day_id") REFERENCES "public"."test_days"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "session_items" ADD CONSTRAINT "session_items_session_id_training_sessions_id_fk" FOREIGN KEY ("session_id") REFERENCES "public"."training_sessions"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "session_items" ADD CONSTRAINT "session_items_overridden_by_users_id_fk" FOREIGN KEY ("overridden_by") REFERENCES "public"."users"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "target_overrides" ADD CONSTRAINT "target_overrides_member_id_members_user_id_fk" FOREIGN KEY ("member_id") REFERENCES "public"."members"("user_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "target_overrides" ADD CONSTRAINT "target_overrides_coach_id_users_id_fk" FOREIGN KEY ("coach_id") REFERENCES "public"."users"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "test_days" ADD CONSTRAINT "test_days_member_id_members_user_id_fk" FOREIGN KEY ("member_id") REFERENCES "public"."members"("user_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "test_days" ADD CONSTRAINT "test_days_flight_id_flights_id_fk" FOREIGN KEY ("flight_id") REFERENCES "public"."flights"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "training_sessions" ADD CONSTRAINT "training_sessions_member_id_members_user_id_fk" FOREIGN KEY ("member_id") REFERENCES "public"."members"("user_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "training_sessions" ADD CONSTRAINT "training_sessions_flight_id_flights_id_fk" FOREIGN KEY ("flight_id") REFERENCES "public"."flights"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "check_ins_unanswered" ON "check_ins" USING btree ("member_id","sent_at") WHERE "check_ins"."answered_at" is null;--> statement-breakpoint
CREATE INDEX "messages_member" ON "messages" USING btree ("member_id","sent_at");--> statement-breakpoint
CREATE INDEX "messages_unread" ON "messages" USING btree ("member_id") WHERE "messages"."read_at" is null;--> statement-breakpoint
CREATE INDEX "photos_member" ON "photos" USING btree ("member_id");--> statement-breakpoint
CREATE INDEX "invoices_member" ON "invoices" USING btree ("member_id","issued_at");--> statement-breakpoint
CREATE INDEX "invoices_issued" ON "invoices" USING btree ("issued_at");--> statement-breakpoint
CREATE INDEX "subscriptions_member" ON "subscriptions" USING btree ("member_id");--> statement-breakpoint
CREATE UNIQUE INDEX "subscriptions_one_live" ON "subscriptions" USING btree ("member_id") WHERE "subscriptions"."status" in ('trialing', 'active', 'past_due', 'unpaid', 'paused');--> statement-breakpoint
CREATE INDEX "consents_user" ON "consents" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "holds_member" ON "holds" USING btree ("member_id","started_at");--> statement-breakpoint
CREATE UNIQUE INDEX "invites_email_open" ON "invites" USING btree (lower("email")) WHERE "invites"."accepted_at" is null;--> statement-breakpoint
CREATE INDEX "members_coach" ON "members" USING btree ("coach_id");--> statement-breakpoint
CREATE INDEX "screens_member" ON "readiness_screens" USING btree ("member_id","answered_at");--> statement-breakpoint
CREATE INDEX "sessions_user" ON "sessions" USING btree ("user_id");--> statement-breakpoint
CREATE UNIQUE INDEX "users_email_unique" ON "users" USING btree (lower("email"));--> statement-breakpoint
CREATE INDEX "users_role" ON "users" USING btree ("role");--> statement-breakpoint
CREATE INDEX "audit_at" ON "audit_entries" USING btree ("at");--> statement-breakpoint
CREATE INDEX "idempotency_created" ON "idempotency_keys" USING btree ("created_at");--> statement-breakpoint
CREATE INDEX "alerts_open" ON "alerts" USING btree ("member_id") WHERE "alerts"."settled_at" is null;--> statement-breakpoint
CREATE INDEX "marks_member" ON "marks" USING btree ("member_id","test","taken_at");--> statement-breakpoint
CREATE INDEX "target_overrides_member" ON "target_overrides" USING btree ("member_id","created_at");--> statement-breakpoint
CREATE INDEX "test_days_member" ON "test_days" USING btree ("member_id","taken_on");--> statement-breakpoint
CREATE UNIQUE INDEX "test_days_one_open" ON "test_days" USING btree ("member_id") WHERE "test_days"."finished_at" is null;--> statement-breakpoint
CREATE INDEX "training_sessions_member" ON "training_sessions" USING btree ("member_id","done_at");--> statement-breakpoint
CREATE INDEX "training_sessions_flight" ON "training_sessions" USING btree ("flight_id","week");--> statement-breakpoint
CREATE UNIQUE INDEX "training_sessions_one_planned" ON "training_sessions" USING btree ("member_id") WHERE "training_sessions"."done_at" is null;