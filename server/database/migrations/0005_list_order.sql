DROP INDEX "letters_failed_idx";--> statement-breakpoint
DROP INDEX "requests_practice_idx";--> statement-breakpoint
DROP INDEX "audit_events_actor_idx";--> statement-breakpoint
DROP INDEX "audit_events_object_idx";--> statement-breakpoint
DROP INDEX "audit_events_patient_idx";--> statement-breakpoint
DROP INDEX "audit_events_action_idx";--> statement-breakpoint
DROP INDEX "audit_events_reference_idx";--> statement-breakpoint
CREATE INDEX "requests_changed_idx" ON "requests" USING btree ("updated_at" DESC NULLS FIRST,"id" DESC NULLS FIRST) WHERE "requests"."state" <> 'draft' and "requests"."state" <> 'discarded';--> statement-breakpoint
CREATE INDEX "requests_done_idx" ON "requests" USING btree ("slot_starts_at","id") WHERE "requests"."state" = 'done';--> statement-breakpoint
CREATE INDEX "letters_failed_idx" ON "letters" USING btree ("queued_at" DESC NULLS FIRST,"id" DESC NULLS FIRST) WHERE "letters"."state" = 'failed';--> statement-breakpoint
CREATE INDEX "requests_practice_idx" ON "requests" USING btree ("practice_id","updated_at" DESC NULLS FIRST,"id" DESC NULLS FIRST) WHERE "requests"."state" <> 'discarded';--> statement-breakpoint
CREATE INDEX "audit_events_actor_idx" ON "audit_events" USING btree ("actor_id","id" DESC NULLS FIRST);--> statement-breakpoint
CREATE INDEX "audit_events_object_idx" ON "audit_events" USING btree ("object_type","object_id","id" DESC NULLS FIRST);--> statement-breakpoint
CREATE INDEX "audit_events_patient_idx" ON "audit_events" USING btree ("patient_id","id" DESC NULLS FIRST);--> statement-breakpoint
CREATE INDEX "audit_events_action_idx" ON "audit_events" USING btree ("action","id" DESC NULLS FIRST);--> statement-breakpoint
CREATE INDEX "audit_events_reference_idx" ON "audit_events" USING btree ("reference","id" DESC NULLS FIRST) WHERE "audit_events"."reference" is not null;