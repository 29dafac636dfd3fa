CREATE TABLE "acknowledgements" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"application_id" uuid NOT NULL,
	"step" text NOT NULL,
	"instance" integer NOT NULL,
	"obligation" text DEFAULT '' NOT NULL,
	"due_on" date NOT NULL,
	"person_id" uuid NOT NULL,
	"reason" text NOT NULL,
	"until_on" date,
	"recorded_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "application_organizations" (
	"application_id" uuid NOT NULL,
	"organization_id" uuid NOT NULL,
	"role" text NOT NULL,
	"desk" text,
	CONSTRAINT "application_organizations_application_id_role_pk" PRIMARY KEY("application_id","role")
);
--> statement-breakpoint
CREATE TABLE "application_states" (
	"application_id" uuid PRIMARY KEY NOT NULL,
	"terms" jsonb NOT NULL,
	"procedure_revision_id" uuid NOT NULL,
	"standing" text NOT NULL,
	"stage" text NOT NULL,
	"stranded" jsonb NOT NULL,
	"at_seq" integer NOT NULL
);
--> statement-breakpoint
CREATE TABLE "applications" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"project_id" uuid NOT NULL,
	"entity_id" uuid,
	"study_group_id" uuid,
	"last_seq" integer DEFAULT 0 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"created_by" uuid
);
--> statement-breakpoint
CREATE TABLE "assignments" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"application_id" uuid NOT NULL,
	"step" text NOT NULL,
	"instance" integer DEFAULT 0 NOT NULL,
	"obligation" text DEFAULT '' NOT NULL,
	"person_id" uuid NOT NULL,
	"recorded_at" timestamp with time zone DEFAULT now() NOT NULL,
	"recorded_by" uuid
);
--> statement-breakpoint
CREATE TABLE "entities" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"signatory" text,
	"notice_address" text,
	CONSTRAINT "entities_name_unique" UNIQUE("name")
);
--> statement-breakpoint
CREATE TABLE "facts" (
	"id" uuid PRIMARY KEY NOT NULL,
	"application_id" uuid,
	"study_group_id" uuid,
	"seq" integer NOT NULL,
	"kind" text NOT NULL,
	"step" text,
	"instance" integer DEFAULT 1 NOT NULL,
	"obligation" text,
	"sent_on" date,
	"sent_at" timestamp with time zone,
	"received_on" date,
	"received_at" timestamp with time zone,
	"due_on" date,
	"due_at" timestamp with time zone,
	"channel" text,
	"outcome" text,
	"amount_minor" bigint,
	"body" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"replaces_id" uuid,
	"reason" text,
	"recorded_at" timestamp with time zone DEFAULT now() NOT NULL,
	"recorded_by" uuid,
	"trust" text DEFAULT 'person' NOT NULL,
	"input_sha256" text NOT NULL,
	CONSTRAINT "facts_replacesId_unique" UNIQUE("replaces_id"),
	CONSTRAINT "facts_application_seq" UNIQUE("application_id","seq"),
	CONSTRAINT "facts_group_seq" UNIQUE("study_group_id","seq")
);
--> statement-breakpoint
CREATE TABLE "notices" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"subject_kind" text NOT NULL,
	"subject_key" text NOT NULL,
	"application_id" uuid,
	"due_on" text DEFAULT '' NOT NULL,
	"rung" text NOT NULL,
	"person_id" uuid NOT NULL,
	"channel" text DEFAULT 'email' NOT NULL,
	"to" text NOT NULL,
	"body" jsonb NOT NULL,
	"attempts" integer DEFAULT 0 NOT NULL,
	"next_attempt_at" timestamp with time zone NOT NULL,
	"lease_until" timestamp with time zone,
	"message_id" text NOT NULL,
	"accepted_at" timestamp with time zone,
	"failed" text,
	"refused_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"ack_secret_hash" text,
	CONSTRAINT "notices_ackSecretHash_unique" UNIQUE("ack_secret_hash"),
	CONSTRAINT "notices_key" UNIQUE("subject_kind","subject_key","due_on","rung","person_id","channel")
);
--> statement-breakpoint
CREATE TABLE "obligations" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"subject_kind" text NOT NULL,
	"subject_id" uuid NOT NULL,
	"step" text NOT NULL,
	"instance" integer NOT NULL,
	"obligation" text DEFAULT '' NOT NULL,
	"application_id" uuid,
	"title" text NOT NULL,
	"short" text,
	"stage" text NOT NULL,
	"party" text NOT NULL,
	"kind" text NOT NULL,
	"on_line" boolean NOT NULL,
	"owner_role" text,
	"consequence" jsonb NOT NULL,
	"status" text NOT NULL,
	"provisional" boolean NOT NULL,
	"outcome" text,
	"start_on" date,
	"due_on" date,
	"due_at" timestamp with time zone,
	"zone" text NOT NULL,
	"stated_due_on" date,
	"start_by" date,
	"done_on" date,
	"done_late" boolean,
	"hour_recorded" boolean,
	"money_target_minor" bigint,
	"money_held_minor" bigint,
	"source" jsonb NOT NULL,
	"derivation" jsonb NOT NULL,
	"position" integer NOT NULL,
	"at_seq" integer NOT NULL,
	CONSTRAINT "obligations_key" UNIQUE("subject_kind","subject_id","step","instance","obligation")
);
--> statement-breakpoint
CREATE TABLE "projects" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"town" text,
	"latitude" double precision,
	"longitude" double precision,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "projects_name_unique" UNIQUE("name")
);
--> statement-breakpoint
CREATE TABLE "study_groups" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"organization_id" uuid NOT NULL,
	"name" text NOT NULL,
	"last_seq" integer DEFAULT 0 NOT NULL
);
--> statement-breakpoint
CREATE TABLE "entries" (
	"id" uuid PRIMARY KEY NOT NULL,
	"revises_id" uuid,
	"at" timestamp with time zone NOT NULL,
	"zone" text NOT NULL,
	"channel" text NOT NULL,
	"direction" text NOT NULL,
	"visibility" text NOT NULL,
	"organization_id" uuid,
	"parties" text NOT NULL,
	"subject" text NOT NULL,
	"text" text NOT NULL,
	"message_id" text,
	"reply_owed_by" text,
	"reply_owed_on" date,
	"answers_id" uuid,
	"input_sha256" text NOT NULL,
	"recorded_at" timestamp with time zone DEFAULT now() NOT NULL,
	"recorded_by" uuid,
	CONSTRAINT "entries_revisesId_unique" UNIQUE("revises_id"),
	CONSTRAINT "entries_messageId_unique" UNIQUE("message_id")
);
--> statement-breakpoint
CREATE TABLE "entry_applications" (
	"entry_id" uuid NOT NULL,
	"application_id" uuid NOT NULL,
	"step" text,
	"instance" integer,
	CONSTRAINT "entry_applications_entry_id_application_id_pk" PRIMARY KEY("entry_id","application_id")
);
--> statement-breakpoint
CREATE TABLE "fact_evidence" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"fact_id" uuid NOT NULL,
	"entry_id" uuid,
	"file_sha256" text,
	"exhibit_revision_id" uuid,
	"recorded_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "fact_evidence_factId_entryId_fileSha256_exhibitRevisionId_unique" UNIQUE NULLS NOT DISTINCT("fact_id","entry_id","file_sha256","exhibit_revision_id")
);
--> statement-breakpoint
CREATE TABLE "file_links" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"subject_kind" text NOT NULL,
	"subject_id" uuid NOT NULL,
	"sha256" text NOT NULL,
	"name" text NOT NULL,
	"restricted_to" uuid[],
	"recorded_at" timestamp with time zone DEFAULT now() NOT NULL,
	"recorded_by" uuid
);
--> statement-breakpoint
CREATE TABLE "files" (
	"sha256" text PRIMARY KEY NOT NULL,
	"size" bigint NOT NULL,
	"type" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "calendar_revisions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"calendar_id" uuid NOT NULL,
	"no" integer NOT NULL,
	"rules" jsonb NOT NULL,
	"recorded_at" timestamp with time zone DEFAULT now() NOT NULL,
	"recorded_by" uuid,
	CONSTRAINT "calendar_revisions_calendarId_no_unique" UNIQUE("calendar_id","no")
);
--> statement-breakpoint
CREATE TABLE "calendars" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"key" text NOT NULL,
	"name" text NOT NULL,
	CONSTRAINT "calendars_key_unique" UNIQUE("key")
);
--> statement-breakpoint
CREATE TABLE "contacts" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"organization_id" uuid NOT NULL,
	"name" text NOT NULL,
	"desk" text,
	"email" text,
	"phone" text
);
--> statement-breakpoint
CREATE TABLE "organizations" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"short_name" text NOT NULL,
	"kind" text NOT NULL,
	"zone" text NOT NULL,
	"closes_at" text,
	"receipt_rule" text NOT NULL,
	"deemed_received_days" integer,
	"calendar_id" uuid NOT NULL,
	"notice_address" text,
	"portal" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "organizations_name_unique" UNIQUE("name")
);
--> statement-breakpoint
CREATE TABLE "procedure_revisions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"procedure_id" uuid NOT NULL,
	"no" integer NOT NULL,
	"body" jsonb NOT NULL,
	"base_revision_id" uuid,
	"overrides" jsonb,
	"sha256" text NOT NULL,
	"recorded_at" timestamp with time zone DEFAULT now() NOT NULL,
	"recorded_by" uuid,
	CONSTRAINT "procedure_revisions_procedureId_no_unique" UNIQUE("procedure_id","no")
);
--> statement-breakpoint
CREATE TABLE "procedures" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"key" text NOT NULL,
	"title" text NOT NULL,
	"organization_id" uuid,
	CONSTRAINT "procedures_key_unique" UNIQUE("key")
);
--> statement-breakpoint
CREATE TABLE "api_tokens" (
	"hash" text PRIMARY KEY NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"person_id" uuid NOT NULL,
	"name" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"last_used_at" timestamp with time zone,
	"revoked_at" timestamp with time zone,
	CONSTRAINT "api_tokens_id_unique" UNIQUE("id")
);
--> statement-breakpoint
CREATE TABLE "attempts" (
	"key" text PRIMARY KEY NOT NULL,
	"count" integer NOT NULL,
	"window_starts_at" timestamp with time zone NOT NULL,
	"blocked_until" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "audit" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"request_id" text NOT NULL,
	"actor_id" uuid,
	"actor_name" text NOT NULL,
	"action" text NOT NULL,
	"subject_kind" text NOT NULL,
	"subject_id" text NOT NULL,
	"before" jsonb,
	"after" jsonb
);
--> statement-breakpoint
CREATE TABLE "one_time_tokens" (
	"hash" text PRIMARY KEY NOT NULL,
	"purpose" text NOT NULL,
	"person_id" uuid NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"used_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "people" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"email" text NOT NULL,
	"name" text NOT NULL,
	"zone" text NOT NULL,
	"password_hash" text,
	"active" boolean DEFAULT true NOT NULL,
	"session_version" integer DEFAULT 1 NOT NULL,
	"calendar_secret_hash" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "people_email_unique" UNIQUE("email"),
	CONSTRAINT "people_calendarSecretHash_unique" UNIQUE("calendar_secret_hash")
);
--> statement-breakpoint
CREATE TABLE "person_roles" (
	"person_id" uuid NOT NULL,
	"role" text NOT NULL,
	CONSTRAINT "person_roles_person_id_role_pk" PRIMARY KEY("person_id","role")
);
--> statement-breakpoint
CREATE TABLE "calculations" (
	"id" uuid PRIMARY KEY NOT NULL,
	"application_id" uuid NOT NULL,
	"no" integer NOT NULL,
	"design_revision_id" uuid NOT NULL,
	"terms_fact_id" uuid,
	"weather_id" uuid NOT NULL,
	"inputs" jsonb NOT NULL,
	"result" jsonb NOT NULL,
	"engine_version" text NOT NULL,
	"sha256" text NOT NULL,
	"recorded_at" timestamp with time zone DEFAULT now() NOT NULL,
	"recorded_by" uuid,
	CONSTRAINT "calculations_applicationId_no_unique" UNIQUE("application_id","no")
);
--> statement-breakpoint
CREATE TABLE "design_revisions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"design_id" uuid NOT NULL,
	"no" integer NOT NULL,
	"body" jsonb NOT NULL,
	"protection" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"metering" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"weather_id" uuid,
	"note" text,
	"recorded_at" timestamp with time zone DEFAULT now() NOT NULL,
	"recorded_by" uuid,
	CONSTRAINT "design_revisions_designId_no_unique" UNIQUE("design_id","no")
);
--> statement-breakpoint
CREATE TABLE "designs" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"project_id" uuid NOT NULL,
	"last_no" integer DEFAULT 0 NOT NULL,
	CONSTRAINT "designs_projectId_unique" UNIQUE("project_id")
);
--> statement-breakpoint
CREATE TABLE "exhibit_revisions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"exhibit_id" uuid NOT NULL,
	"no" integer NOT NULL,
	"state" text NOT NULL,
	"calculation_id" uuid,
	"design_revision_id" uuid,
	"data" jsonb NOT NULL,
	"file_sha256" text,
	"sealed_file_sha256" text,
	"note" text,
	"render" text DEFAULT 'waiting' NOT NULL,
	"render_error" text,
	"prepared_by" uuid NOT NULL,
	"prepared_at" timestamp with time zone NOT NULL,
	"checked_by" uuid,
	"checked_at" timestamp with time zone,
	"issued_by" uuid,
	"issued_at" timestamp with time zone,
	CONSTRAINT "exhibit_revisions_exhibitId_no_unique" UNIQUE("exhibit_id","no")
);
--> statement-breakpoint
CREATE TABLE "exhibits" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"application_id" uuid NOT NULL,
	"letter" text NOT NULL,
	"last_no" integer DEFAULT 0 NOT NULL,
	CONSTRAINT "exhibits_applicationId_letter_unique" UNIQUE("application_id","letter")
);
--> statement-breakpoint
CREATE TABLE "weather" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"sha256" text NOT NULL,
	"kind" text NOT NULL,
	"name" text NOT NULL,
	"meta" jsonb NOT NULL,
	"report" jsonb NOT NULL,
	"recorded_at" timestamp with time zone DEFAULT now() NOT NULL,
	"recorded_by" uuid,
	CONSTRAINT "weather_sha256_unique" UNIQUE("sha256")
);
--> statement-breakpoint
ALTER TABLE "acknowledgements" ADD CONSTRAINT "acknowledgements_application_id_applications_id_fk" FOREIGN KEY ("application_id") REFERENCES "public"."applications"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "acknowledgements" ADD CONSTRAINT "acknowledgements_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "application_organizations" ADD CONSTRAINT "application_organizations_application_id_applications_id_fk" FOREIGN KEY ("application_id") REFERENCES "public"."applications"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "application_organizations" ADD CONSTRAINT "application_organizations_organization_id_organizations_id_fk" FOREIGN KEY ("organization_id") REFERENCES "public"."organizations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "application_states" ADD CONSTRAINT "application_states_application_id_applications_id_fk" FOREIGN KEY ("application_id") REFERENCES "public"."applications"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "application_states" ADD CONSTRAINT "application_states_procedure_revision_id_procedure_revisions_id_fk" FOREIGN KEY ("procedure_revision_id") REFERENCES "public"."procedure_revisions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "applications" ADD CONSTRAINT "applications_project_id_projects_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."projects"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "applications" ADD CONSTRAINT "applications_entity_id_entities_id_fk" FOREIGN KEY ("entity_id") REFERENCES "public"."entities"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "applications" ADD CONSTRAINT "applications_study_group_id_study_groups_id_fk" FOREIGN KEY ("study_group_id") REFERENCES "public"."study_groups"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "applications" ADD CONSTRAINT "applications_created_by_people_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "assignments" ADD CONSTRAINT "assignments_application_id_applications_id_fk" FOREIGN KEY ("application_id") REFERENCES "public"."applications"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "assignments" ADD CONSTRAINT "assignments_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "facts" ADD CONSTRAINT "facts_application_id_applications_id_fk" FOREIGN KEY ("application_id") REFERENCES "public"."applications"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "facts" ADD CONSTRAINT "facts_study_group_id_study_groups_id_fk" FOREIGN KEY ("study_group_id") REFERENCES "public"."study_groups"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "facts" ADD CONSTRAINT "facts_recorded_by_people_id_fk" FOREIGN KEY ("recorded_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "notices" ADD CONSTRAINT "notices_application_id_applications_id_fk" FOREIGN KEY ("application_id") REFERENCES "public"."applications"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "notices" ADD CONSTRAINT "notices_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "obligations" ADD CONSTRAINT "obligations_application_id_applications_id_fk" FOREIGN KEY ("application_id") REFERENCES "public"."applications"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "study_groups" ADD CONSTRAINT "study_groups_organization_id_organizations_id_fk" FOREIGN KEY ("organization_id") REFERENCES "public"."organizations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "entries" ADD CONSTRAINT "entries_organization_id_organizations_id_fk" FOREIGN KEY ("organization_id") REFERENCES "public"."organizations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "entries" ADD CONSTRAINT "entries_recorded_by_people_id_fk" FOREIGN KEY ("recorded_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "entry_applications" ADD CONSTRAINT "entry_applications_entry_id_entries_id_fk" FOREIGN KEY ("entry_id") REFERENCES "public"."entries"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "entry_applications" ADD CONSTRAINT "entry_applications_application_id_applications_id_fk" FOREIGN KEY ("application_id") REFERENCES "public"."applications"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "fact_evidence" ADD CONSTRAINT "fact_evidence_fact_id_facts_id_fk" FOREIGN KEY ("fact_id") REFERENCES "public"."facts"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "fact_evidence" ADD CONSTRAINT "fact_evidence_entry_id_entries_id_fk" FOREIGN KEY ("entry_id") REFERENCES "public"."entries"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "fact_evidence" ADD CONSTRAINT "fact_evidence_file_sha256_files_sha256_fk" FOREIGN KEY ("file_sha256") REFERENCES "public"."files"("sha256") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "file_links" ADD CONSTRAINT "file_links_sha256_files_sha256_fk" FOREIGN KEY ("sha256") REFERENCES "public"."files"("sha256") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "file_links" ADD CONSTRAINT "file_links_recorded_by_people_id_fk" FOREIGN KEY ("recorded_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "calendar_revisions" ADD CONSTRAINT "calendar_revisions_calendar_id_calendars_id_fk" FOREIGN KEY ("calendar_id") REFERENCES "public"."calendars"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "contacts" ADD CONSTRAINT "contacts_organization_id_organizations_id_fk" FOREIGN KEY ("organization_id") REFERENCES "public"."organizations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "organizations" ADD CONSTRAINT "organizations_calendar_id_calendars_id_fk" FOREIGN KEY ("calendar_id") REFERENCES "public"."calendars"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "procedure_revisions" ADD CONSTRAINT "procedure_revisions_procedure_id_procedures_id_fk" FOREIGN KEY ("procedure_id") REFERENCES "public"."procedures"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "procedures" ADD CONSTRAINT "procedures_organization_id_organizations_id_fk" FOREIGN KEY ("organization_id") REFERENCES "public"."organizations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "api_tokens" ADD CONSTRAINT "api_tokens_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "one_time_tokens" ADD CONSTRAINT "one_time_tokens_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "person_roles" ADD CONSTRAINT "person_roles_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "calculations" ADD CONSTRAINT "calculations_application_id_applications_id_fk" FOREIGN KEY ("application_id") REFERENCES "public"."applications"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "calculations" ADD CONSTRAINT "calculations_design_revision_id_design_revisions_id_fk" FOREIGN KEY ("design_revision_id") REFERENCES "public"."design_revisions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "calculations" ADD CONSTRAINT "calculations_terms_fact_id_facts_id_fk" FOREIGN KEY ("terms_fact_id") REFERENCES "public"."facts"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "calculations" ADD CONSTRAINT "calculations_weather_id_weather_id_fk" FOREIGN KEY ("weather_id") REFERENCES "public"."weather"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "calculations" ADD CONSTRAINT "calculations_recorded_by_people_id_fk" FOREIGN KEY ("recorded_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "design_revisions" ADD CONSTRAINT "design_revisions_design_id_designs_id_fk" FOREIGN KEY ("design_id") REFERENCES "public"."designs"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "design_revisions" ADD CONSTRAINT "design_revisions_weather_id_weather_id_fk" FOREIGN KEY ("weather_id") REFERENCES "public"."weather"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "design_revisions" ADD CONSTRAINT "design_revisions_recorded_by_people_id_fk" FOREIGN KEY ("recorded_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "designs" ADD CONSTRAINT "designs_project_id_projects_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."projects"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "exhibit_revisions" ADD CONSTRAINT "exhibit_revisions_exhibit_id_exhibits_id_fk" FOREIGN KEY ("exhibit_id") REFERENCES "public"."exhibits"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "exhibit_revisions" ADD CONSTRAINT "exhibit_revisions_calculation_id_calculations_id_fk" FOREIGN KEY ("calculation_id") REFERENCES "public"."calculations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "exhibit_revisions" ADD CONSTRAINT "exhibit_revisions_design_revision_id_design_revisions_id_fk" FOREIGN KEY ("design_revision_id") REFERENCES "public"."design_revisions"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "exhibit_revisions" ADD CONSTRAINT "exhibit_revisions_file_sha256_files_sha256_fk" FOREIGN KEY ("file_sha256") REFERENCES "public"."files"("sha256") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "exhibit_revisions" ADD CONSTRAINT "exhibit_revisions_sealed_file_sha256_files_sha256_fk" FOREIGN KEY ("sealed_file_sha256") REFERENCES "public"."files"("sha256") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "exhibit_revisions" ADD CONSTRAINT "exhibit_revisions_prepared_by_people_id_fk" FOREIGN KEY ("prepared_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "exhibit_revisions" ADD CONSTRAINT "exhibit_revisions_checked_by_people_id_fk" FOREIGN KEY ("checked_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "exhibit_revisions" ADD CONSTRAINT "exhibit_revisions_issued_by_people_id_fk" FOREIGN KEY ("issued_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "exhibits" ADD CONSTRAINT "exhibits_application_id_applications_id_fk" FOREIGN KEY ("application_id") REFERENCES "public"."applications"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "weather" ADD CONSTRAINT "weather_sha256_files_sha256_fk" FOREIGN KEY ("sha256") REFERENCES "public"."files"("sha256") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "weather" ADD CONSTRAINT "weather_recorded_by_people_id_fk" FOREIGN KEY ("recorded_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "acknowledgements_key" ON "acknowledgements" USING btree ("application_id","step","instance");--> statement-breakpoint
CREATE INDEX "assignments_application" ON "assignments" USING btree ("application_id");--> statement-breakpoint
CREATE INDEX "notices_waiting" ON "notices" USING btree ("next_attempt_at") WHERE accepted_at is null and refused_at is null;--> statement-breakpoint
CREATE INDEX "obligations_open" ON "obligations" USING btree ("status","due_on");--> statement-breakpoint
CREATE INDEX "obligations_application" ON "obligations" USING btree ("application_id");--> statement-breakpoint
CREATE INDEX "entry_applications_app" ON "entry_applications" USING btree ("application_id");--> statement-breakpoint
CREATE INDEX "fact_evidence_fact" ON "fact_evidence" USING btree ("fact_id");--> statement-breakpoint
CREATE INDEX "file_links_subject" ON "file_links" USING btree ("subject_kind","subject_id");--> statement-breakpoint
CREATE INDEX "audit_subject" ON "audit" USING btree ("subject_kind","subject_id");