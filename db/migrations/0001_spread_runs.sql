CREATE TABLE "spread_runs" (
	"id" uuid PRIMARY KEY NOT NULL,
	"state" text DEFAULT 'queued' NOT NULL,
	"evaluations_done" integer DEFAULT 0 NOT NULL,
	"evaluations_total" integer NOT NULL,
	"request" jsonb NOT NULL,
	"interim" jsonb,
	"result" jsonb,
	"problem" jsonb,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"started_at" timestamp with time zone,
	"finished_at" timestamp with time zone,
	"expires_at" timestamp with time zone NOT NULL,
	CONSTRAINT "spread_runs_state_known" CHECK ("spread_runs"."state" in ('queued', 'running', 'done', 'failed', 'cancelled')),
	CONSTRAINT "spread_runs_evaluations_range" CHECK ("spread_runs"."evaluations_done" between 0 and "spread_runs"."evaluations_total" and "spread_runs"."evaluations_total" > 0),
	CONSTRAINT "spread_runs_result_when_done" CHECK (("spread_runs"."state" = 'done') = ("spread_runs"."result" is not null)),
	CONSTRAINT "spread_runs_problem_when_failed" CHECK (("spread_runs"."state" = 'failed') = ("spread_runs"."problem" is not null)),
	CONSTRAINT "spread_runs_finished_at_end" CHECK (("spread_runs"."state" in ('queued', 'running')) = ("spread_runs"."finished_at" is null))
);
--> statement-breakpoint
CREATE INDEX "spread_runs_expired_idx" ON "spread_runs" USING btree ("expires_at");--> statement-breakpoint
CREATE INDEX "spread_runs_unfinished_idx" ON "spread_runs" USING btree ("id") WHERE "spread_runs"."state" in ('queued', 'running');