CREATE TABLE "sample_designs" (
	"slug" text PRIMARY KEY NOT NULL,
	"title" text NOT NULL,
	"summary" text NOT NULL,
	"design" jsonb NOT NULL,
	"position" integer NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "sample_designs_position_key" UNIQUE("position"),
	CONSTRAINT "sample_designs_slug_shape" CHECK ("sample_designs"."slug" ~ '^[a-z0-9]+(-[a-z0-9]+)*$'),
	CONSTRAINT "sample_designs_title_filled" CHECK (length(trim("sample_designs"."title")) > 0),
	CONSTRAINT "sample_designs_position_range" CHECK ("sample_designs"."position" >= 1),
	CONSTRAINT "sample_designs_design_object" CHECK (jsonb_typeof("sample_designs"."design") = 'object')
);
