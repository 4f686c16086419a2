CREATE TYPE "public"."role" AS ENUM('orderer', 'radiologist', 'scheduler', 'administrator');--> statement-breakpoint
CREATE TYPE "public"."agent" AS ENUM('gadobutrol', 'gadoterate', 'gadoteridol', 'gadopiclenol', 'gadobenate', 'gadoxetate', 'gadopentetate', 'gadodiamide', 'gadoversetamide', 'gadofosveset');--> statement-breakpoint
CREATE TYPE "public"."assessment_cause" AS ENUM('send', 'answer', 'decision', 'booking', 'reopen');--> statement-breakpoint
CREATE TYPE "public"."decision_kind" AS ENUM('approved', 'declined');--> statement-breakpoint
CREATE TYPE "public"."letter_kind" AS ENUM('before', 'after', 'changed');--> statement-breakpoint
CREATE TYPE "public"."letter_state" AS ENUM('queued', 'delivered', 'failed', 'held', 'cancelled', 'no-address', 'handed-over');--> statement-breakpoint
CREATE TYPE "public"."message_kind" AS ENUM('query', 'question', 'answer', 'note');--> statement-breakpoint
CREATE TYPE "public"."need_kind" AS ENUM('creatinine', 'iv-start', 'pregnancy-answer', 'weight', 'height', 'premedication', 'dialysis-after', 'radiologist-word', 'reaction-history', 'medication-guide', 'implant-clearance', 'interpreter', 'sedation', 'radiologist-present', 'observation');--> statement-breakpoint
CREATE TYPE "public"."need_state" AS ENUM('open', 'arranged', 'met', 'waived');--> statement-breakpoint
CREATE TYPE "public"."contrast_outcome" AS ENUM('none', 'iv-with-and-without', 'iv-with-only', 'iv-hepatobiliary', 'intra-articular', 'discuss');--> statement-breakpoint
CREATE TYPE "public"."priority" AS ENUM('routine', 'urgent', 'asap', 'stat');--> statement-breakpoint
CREATE TYPE "public"."request_state" AS ENUM('draft', 'sent', 'queried', 'approved', 'booked', 'done', 'closed', 'declined', 'withdrawn', 'refused', 'reopened', 'discarded');--> statement-breakpoint
CREATE TYPE "public"."side" AS ENUM('ordering', 'imaging');--> statement-breakpoint
CREATE SEQUENCE "public"."request_number" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1;--> statement-breakpoint
CREATE TABLE "invitations" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"user_id" uuid NOT NULL,
	"token_hash" text,
	"invited_by_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"accepted_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "memberships" (
	"user_id" uuid NOT NULL,
	"practice_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "memberships_pkey" PRIMARY KEY("user_id","practice_id")
);
--> statement-breakpoint
CREATE TABLE "practices" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"phone" text DEFAULT '' NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"disabled_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "practices_name_check" CHECK (length("practices"."name") between 1 and 120)
);
--> statement-breakpoint
CREATE TABLE "sessions" (
	"id_hash" text PRIMARY KEY NOT NULL,
	"user_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"last_seen_at" timestamp with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"ended_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "users" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"email" text NOT NULL,
	"name" text NOT NULL,
	"role" "role" NOT NULL,
	"may_sign" boolean DEFAULT false NOT NULL,
	"guidance_lead" boolean DEFAULT false NOT NULL,
	"password_hash" text,
	"demo" boolean DEFAULT false NOT NULL,
	"shortcuts" boolean DEFAULT true NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"disabled_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "users_name_check" CHECK (length("users"."name") between 1 and 120)
);
--> statement-breakpoint
CREATE TABLE "administrations" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"request_id" uuid NOT NULL,
	"patient_id" uuid NOT NULL,
	"given" boolean NOT NULL,
	"contrast" "contrast_outcome" NOT NULL,
	"agent" "agent",
	"volume_ml" double precision,
	"amount_mmol" double precision,
	"lot" text DEFAULT '' NOT NULL,
	"given_at" timestamp with time zone NOT NULL,
	"differs_reason" text DEFAULT '' NOT NULL,
	"reaction" text DEFAULT 'none' NOT NULL,
	"reaction_detail" text DEFAULT '' NOT NULL,
	"extravasation" boolean DEFAULT false NOT NULL,
	"recorded_by_id" uuid NOT NULL,
	"recorded_at" timestamp with time zone DEFAULT now() NOT NULL,
	"corrects_id" uuid,
	CONSTRAINT "administrations_agent_check" CHECK ("administrations"."given" = ("administrations"."agent" is not null)),
	CONSTRAINT "administrations_reaction_check" CHECK ("administrations"."reaction" in ('none', 'mild', 'moderate', 'severe')),
	CONSTRAINT "administrations_volume_check" CHECK ("administrations"."volume_ml" is null or ("administrations"."volume_ml" > 0 and "administrations"."volume_ml" <= 100))
);
--> statement-breakpoint
CREATE TABLE "assessments" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"request_id" uuid NOT NULL,
	"cause" "assessment_cause" NOT NULL,
	"inputs" jsonb NOT NULL,
	"result" jsonb NOT NULL,
	"engine_version" text NOT NULL,
	"guidance_version_id" uuid NOT NULL,
	"policy_version_id" uuid NOT NULL,
	"created_by_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "decisions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"request_id" uuid NOT NULL,
	"kind" "decision_kind" NOT NULL,
	"contrast" "contrast_outcome",
	"agent" "agent",
	"dose_mmol_per_kg" double precision,
	"weight_kg" double precision,
	"amount_mmol" double precision,
	"volume_ml" double precision,
	"note" text DEFAULT '' NOT NULL,
	"differs_reason" text,
	"decline_reason" text,
	"help_instead" text,
	"assessment_id" uuid NOT NULL,
	"signed_by_id" uuid NOT NULL,
	"signed_at" timestamp with time zone NOT NULL,
	"supersedes_id" uuid,
	CONSTRAINT "decisions_approved_check" CHECK ("decisions"."kind" <> 'approved' or ("decisions"."contrast" is not null and "decisions"."contrast" = any (array['none','iv-with-and-without','iv-with-only','iv-hepatobiliary','intra-articular']::contrast_outcome[]))),
	CONSTRAINT "decisions_declined_check" CHECK ("decisions"."kind" <> 'declined' or length("decisions"."decline_reason") > 0),
	CONSTRAINT "decisions_agent_check" CHECK ("decisions"."kind" <> 'approved' or ("decisions"."contrast" = 'none') = ("decisions"."agent" is null))
);
--> statement-breakpoint
CREATE TABLE "explanation_visits" (
	"id_hash" text PRIMARY KEY NOT NULL,
	"token_hash" text NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "letter_links" (
	"token_hash" text PRIMARY KEY NOT NULL,
	"letter_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"wrong_tries" integer DEFAULT 0 NOT NULL,
	"revoked_at" timestamp with time zone,
	"opened_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "letters" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"request_id" uuid NOT NULL,
	"patient_id" uuid NOT NULL,
	"kind" "letter_kind" NOT NULL,
	"content" jsonb NOT NULL,
	"detailed" boolean NOT NULL,
	"to_address" text,
	"state" "letter_state" NOT NULL,
	"attempts" integer DEFAULT 0 NOT NULL,
	"last_error" text,
	"message_id" text,
	"queued_at" timestamp with time zone DEFAULT now() NOT NULL,
	"delivered_at" timestamp with time zone,
	"created_by_id" uuid
);
--> statement-breakpoint
CREATE TABLE "messages" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"request_id" uuid NOT NULL,
	"kind" "message_kind" NOT NULL,
	"side" "side" NOT NULL,
	"author_id" uuid NOT NULL,
	"body" text NOT NULL,
	"internal" boolean DEFAULT false NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "messages_body_check" CHECK (length(btrim("messages"."body")) between 1 and 4000)
);
--> statement-breakpoint
CREATE TABLE "need_events" (
	"id" bigint PRIMARY KEY GENERATED ALWAYS AS IDENTITY (sequence name "need_events_id_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1),
	"request_id" uuid NOT NULL,
	"kind" "need_kind" NOT NULL,
	"state" "need_state" NOT NULL,
	"note" text DEFAULT '' NOT NULL,
	"by_id" uuid,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "need_events_waived_check" CHECK ("need_events"."state" <> 'waived' or length("need_events"."note") > 0)
);
--> statement-breakpoint
CREATE TABLE "patients" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"ehr_id" text NOT NULL,
	"record_number" text NOT NULL,
	"family_name" text NOT NULL,
	"given_name" text NOT NULL,
	"display_name" text NOT NULL,
	"birth_date" text NOT NULL,
	"sex" text NOT NULL,
	"email" text,
	"phone" text,
	"language" text DEFAULT 'en' NOT NULL,
	"details_by_email" boolean,
	"consent_asked_by_id" uuid,
	"consent_asked_at" timestamp with time zone,
	"read_at" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "patients_birth_date_check" CHECK ("patients"."birth_date" ~ '^[0-9]{4}(-[0-9]{2}(-[0-9]{2})?)?$'),
	CONSTRAINT "patients_sex_check" CHECK ("patients"."sex" in ('female', 'male', 'other', 'unknown')),
	CONSTRAINT "patients_consent_check" CHECK (("patients"."details_by_email" is null) = ("patients"."consent_asked_at" is null))
);
--> statement-breakpoint
CREATE TABLE "requests" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"reference" text,
	"state" "request_state" DEFAULT 'draft' NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"practice_id" uuid NOT NULL,
	"patient_id" uuid NOT NULL,
	"prepared_by_id" uuid NOT NULL,
	"signed_by_id" uuid,
	"form" jsonb NOT NULL,
	"record" jsonb,
	"record_read_at" timestamp with time zone,
	"question_id" text,
	"region" text,
	"exam_name" text,
	"priority" "priority" DEFAULT 'routine' NOT NULL,
	"priority_rank" smallint DEFAULT 3 NOT NULL,
	"sentence" text,
	"outcome" "contrast_outcome",
	"gate_egfr" double precision,
	"kidney_line" text,
	"current_assessment_id" uuid,
	"current_decision_id" uuid,
	"awaiting" "side",
	"reply_waiting" boolean DEFAULT false NOT NULL,
	"copied_from_id" uuid,
	"sent_at" timestamp with time zone,
	"due_at" timestamp with time zone,
	"decided_at" timestamp with time zone,
	"scanner_id" uuid,
	"slot_starts_at" timestamp with time zone,
	"slot_ends_at" timestamp with time zone,
	"closed_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "requests_reference_check" CHECK (("requests"."state" in ('draft', 'discarded')) or ("requests"."reference" is not null and "requests"."signed_by_id" is not null and "requests"."sent_at" is not null)),
	CONSTRAINT "requests_slot_check" CHECK (("requests"."slot_starts_at" is null) = ("requests"."slot_ends_at" is null) and ("requests"."slot_ends_at" is null or "requests"."slot_ends_at" > "requests"."slot_starts_at")),
	CONSTRAINT "requests_booked_check" CHECK ("requests"."state" <> 'booked' or ("requests"."slot_starts_at" is not null and "requests"."scanner_id" is not null and "requests"."current_decision_id" is not null)),
	CONSTRAINT "requests_decided_check" CHECK ("requests"."state" not in ('approved', 'booked', 'done', 'declined') or "requests"."current_decision_id" is not null),
	CONSTRAINT "requests_version_check" CHECK ("requests"."version" > 0)
);
--> statement-breakpoint
CREATE TABLE "guidance_versions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"label" text NOT NULL,
	"content" jsonb NOT NULL,
	"signed_by" text NOT NULL,
	"effective_from" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "policy_versions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"label" text NOT NULL,
	"content" jsonb NOT NULL,
	"signed_by" text NOT NULL,
	"effective_from" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "scanners" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"place" text NOT NULL,
	"field_strength_tesla" text NOT NULL,
	"iv_hours" text NOT NULL,
	"position" integer NOT NULL
);
--> statement-breakpoint
CREATE TABLE "audit_events" (
	"id" bigint PRIMARY KEY GENERATED ALWAYS AS IDENTITY (sequence name "audit_events_id_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1),
	"at" timestamp with time zone DEFAULT clock_timestamp() NOT NULL,
	"actor_kind" text NOT NULL,
	"actor_id" uuid,
	"actor_name" text NOT NULL,
	"actor_role" text,
	"action" text NOT NULL,
	"object_type" text NOT NULL,
	"object_id" text,
	"reference" text,
	"patient_id" uuid,
	"practice_id" uuid,
	"detail" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"outcome" text DEFAULT 'ok' NOT NULL,
	"request_id" text NOT NULL,
	CONSTRAINT "audit_events_outcome_check" CHECK ("audit_events"."outcome" in ('ok', 'refused')),
	CONSTRAINT "audit_events_actor_check" CHECK ("audit_events"."actor_kind" in ('user', 'system', 'patient', 'nobody'))
);
--> statement-breakpoint
CREATE TABLE "audit_seals" (
	"day" date PRIMARY KEY NOT NULL,
	"rows" integer NOT NULL,
	"last_id" bigint,
	"previous_hash" text NOT NULL,
	"hash" text NOT NULL,
	"sealed_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "idempotency_keys" (
	"user_id" uuid NOT NULL,
	"route" text NOT NULL,
	"key" text NOT NULL,
	"fingerprint" text NOT NULL,
	"status" integer NOT NULL,
	"response" jsonb NOT NULL,
	"etag" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "idempotency_keys_pkey" PRIMARY KEY("user_id","route","key")
);
--> statement-breakpoint
CREATE TABLE "installation" (
	"key" text PRIMARY KEY NOT NULL,
	"value" jsonb NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "invitations" ADD CONSTRAINT "invitations_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitations" ADD CONSTRAINT "invitations_invited_by_id_users_id_fk" FOREIGN KEY ("invited_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "memberships" ADD CONSTRAINT "memberships_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "memberships" ADD CONSTRAINT "memberships_practice_id_practices_id_fk" FOREIGN KEY ("practice_id") REFERENCES "public"."practices"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sessions" ADD CONSTRAINT "sessions_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "administrations" ADD CONSTRAINT "administrations_request_id_requests_id_fk" FOREIGN KEY ("request_id") REFERENCES "public"."requests"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "administrations" ADD CONSTRAINT "administrations_patient_id_patients_id_fk" FOREIGN KEY ("patient_id") REFERENCES "public"."patients"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "administrations" ADD CONSTRAINT "administrations_recorded_by_id_users_id_fk" FOREIGN KEY ("recorded_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "administrations" ADD CONSTRAINT "administrations_corrects_id_administrations_id_fk" FOREIGN KEY ("corrects_id") REFERENCES "public"."administrations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "assessments" ADD CONSTRAINT "assessments_request_id_requests_id_fk" FOREIGN KEY ("request_id") REFERENCES "public"."requests"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "assessments" ADD CONSTRAINT "assessments_guidance_version_id_guidance_versions_id_fk" FOREIGN KEY ("guidance_version_id") REFERENCES "public"."guidance_versions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "assessments" ADD CONSTRAINT "assessments_policy_version_id_policy_versions_id_fk" FOREIGN KEY ("policy_version_id") REFERENCES "public"."policy_versions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "assessments" ADD CONSTRAINT "assessments_created_by_id_users_id_fk" FOREIGN KEY ("created_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "decisions" ADD CONSTRAINT "decisions_request_id_requests_id_fk" FOREIGN KEY ("request_id") REFERENCES "public"."requests"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "decisions" ADD CONSTRAINT "decisions_assessment_id_assessments_id_fk" FOREIGN KEY ("assessment_id") REFERENCES "public"."assessments"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "decisions" ADD CONSTRAINT "decisions_signed_by_id_users_id_fk" FOREIGN KEY ("signed_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "decisions" ADD CONSTRAINT "decisions_supersedes_id_decisions_id_fk" FOREIGN KEY ("supersedes_id") REFERENCES "public"."decisions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "explanation_visits" ADD CONSTRAINT "explanation_visits_token_hash_letter_links_token_hash_fk" FOREIGN KEY ("token_hash") REFERENCES "public"."letter_links"("token_hash") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "letter_links" ADD CONSTRAINT "letter_links_letter_id_letters_id_fk" FOREIGN KEY ("letter_id") REFERENCES "public"."letters"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "letters" ADD CONSTRAINT "letters_request_id_requests_id_fk" FOREIGN KEY ("request_id") REFERENCES "public"."requests"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "letters" ADD CONSTRAINT "letters_patient_id_patients_id_fk" FOREIGN KEY ("patient_id") REFERENCES "public"."patients"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "letters" ADD CONSTRAINT "letters_created_by_id_users_id_fk" FOREIGN KEY ("created_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "messages" ADD CONSTRAINT "messages_request_id_requests_id_fk" FOREIGN KEY ("request_id") REFERENCES "public"."requests"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "messages" ADD CONSTRAINT "messages_author_id_users_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "need_events" ADD CONSTRAINT "need_events_request_id_requests_id_fk" FOREIGN KEY ("request_id") REFERENCES "public"."requests"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "need_events" ADD CONSTRAINT "need_events_by_id_users_id_fk" FOREIGN KEY ("by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "patients" ADD CONSTRAINT "patients_consent_asked_by_id_users_id_fk" FOREIGN KEY ("consent_asked_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "requests" ADD CONSTRAINT "requests_practice_id_practices_id_fk" FOREIGN KEY ("practice_id") REFERENCES "public"."practices"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "requests" ADD CONSTRAINT "requests_patient_id_patients_id_fk" FOREIGN KEY ("patient_id") REFERENCES "public"."patients"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "requests" ADD CONSTRAINT "requests_prepared_by_id_users_id_fk" FOREIGN KEY ("prepared_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "requests" ADD CONSTRAINT "requests_signed_by_id_users_id_fk" FOREIGN KEY ("signed_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "requests" ADD CONSTRAINT "requests_current_assessment_id_assessments_id_fk" FOREIGN KEY ("current_assessment_id") REFERENCES "public"."assessments"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "requests" ADD CONSTRAINT "requests_current_decision_id_decisions_id_fk" FOREIGN KEY ("current_decision_id") REFERENCES "public"."decisions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "requests" ADD CONSTRAINT "requests_copied_from_id_requests_id_fk" FOREIGN KEY ("copied_from_id") REFERENCES "public"."requests"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "requests" ADD CONSTRAINT "requests_scanner_id_scanners_id_fk" FOREIGN KEY ("scanner_id") REFERENCES "public"."scanners"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "invitations_token_key" ON "invitations" USING btree ("token_hash");--> statement-breakpoint
CREATE INDEX "invitations_user_idx" ON "invitations" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "memberships_practice_idx" ON "memberships" USING btree ("practice_id");--> statement-breakpoint
CREATE UNIQUE INDEX "practices_name_key" ON "practices" USING btree (lower("name"));--> statement-breakpoint
CREATE INDEX "sessions_open_user_idx" ON "sessions" USING btree ("user_id") WHERE "sessions"."ended_at" is null;--> statement-breakpoint
CREATE UNIQUE INDEX "users_email_key" ON "users" USING btree (lower("email"));--> statement-breakpoint
CREATE INDEX "administrations_patient_idx" ON "administrations" USING btree ("patient_id","given_at" DESC NULLS LAST);--> statement-breakpoint
CREATE INDEX "administrations_request_idx" ON "administrations" USING btree ("request_id");--> statement-breakpoint
CREATE UNIQUE INDEX "administrations_corrects_key" ON "administrations" USING btree ("corrects_id");--> statement-breakpoint
CREATE INDEX "assessments_request_idx" ON "assessments" USING btree ("request_id","created_at" DESC NULLS LAST);--> statement-breakpoint
CREATE INDEX "decisions_request_idx" ON "decisions" USING btree ("request_id","signed_at" DESC NULLS LAST);--> statement-breakpoint
CREATE INDEX "letter_links_letter_idx" ON "letter_links" USING btree ("letter_id");--> statement-breakpoint
CREATE INDEX "letters_request_idx" ON "letters" USING btree ("request_id","queued_at" DESC NULLS LAST);--> statement-breakpoint
CREATE INDEX "letters_failed_idx" ON "letters" USING btree ("queued_at" DESC NULLS LAST,"id" DESC NULLS LAST) WHERE "letters"."state" = 'failed';--> statement-breakpoint
CREATE INDEX "messages_request_idx" ON "messages" USING btree ("request_id","created_at");--> statement-breakpoint
CREATE INDEX "need_events_request_idx" ON "need_events" USING btree ("request_id","kind","id" DESC NULLS LAST);--> statement-breakpoint
CREATE UNIQUE INDEX "patients_ehr_id_key" ON "patients" USING btree ("ehr_id");--> statement-breakpoint
CREATE INDEX "patients_record_number_idx" ON "patients" USING btree ("record_number");--> statement-breakpoint
CREATE INDEX "patients_name_idx" ON "patients" USING gin (lower("display_name") gin_trgm_ops);--> statement-breakpoint
CREATE UNIQUE INDEX "requests_reference_key" ON "requests" USING btree ("reference");--> statement-breakpoint
CREATE INDEX "requests_review_idx" ON "requests" USING btree ("priority_rank","due_at","id") WHERE "requests"."state" in ('sent', 'queried', 'reopened');--> statement-breakpoint
CREATE INDEX "requests_practice_idx" ON "requests" USING btree ("practice_id","updated_at" DESC NULLS LAST,"id" DESC NULLS LAST) WHERE "requests"."state" <> 'discarded';--> statement-breakpoint
CREATE INDEX "requests_preparation_idx" ON "requests" USING btree ("slot_starts_at","id") WHERE "requests"."state" in ('approved', 'booked', 'reopened', 'queried');--> statement-breakpoint
CREATE INDEX "requests_patient_idx" ON "requests" USING btree ("patient_id","created_at" DESC NULLS LAST);--> statement-breakpoint
CREATE UNIQUE INDEX "guidance_versions_label_key" ON "guidance_versions" USING btree ("label");--> statement-breakpoint
CREATE UNIQUE INDEX "policy_versions_label_key" ON "policy_versions" USING btree ("label");--> statement-breakpoint
CREATE UNIQUE INDEX "scanners_name_key" ON "scanners" USING btree ("name");--> statement-breakpoint
CREATE INDEX "audit_events_actor_idx" ON "audit_events" USING btree ("actor_id","id" DESC NULLS LAST);--> statement-breakpoint
CREATE INDEX "audit_events_object_idx" ON "audit_events" USING btree ("object_type","object_id","id" DESC NULLS LAST);--> statement-breakpoint
CREATE INDEX "audit_events_patient_idx" ON "audit_events" USING btree ("patient_id","id" DESC NULLS LAST);--> statement-breakpoint
CREATE INDEX "audit_events_action_idx" ON "audit_events" USING btree ("action","id" DESC NULLS LAST);--> statement-breakpoint
CREATE INDEX "idempotency_keys_created_idx" ON "idempotency_keys" USING btree ("created_at");