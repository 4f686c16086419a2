CREATE INDEX "requests_awaiting_idx" ON "requests" USING btree ("practice_id") WHERE "requests"."awaiting" = 'ordering';--> statement-breakpoint
CREATE INDEX "audit_events_reference_idx" ON "audit_events" USING btree ("reference","id" DESC NULLS LAST) WHERE "audit_events"."reference" is not null;--> statement-breakpoint
CREATE INDEX "audit_events_at_idx" ON "audit_events" USING btree ("at");