ALTER TABLE "projects" ADD CONSTRAINT "projects_practice_key" UNIQUE("practice_id","id");
--> statement-breakpoint
ALTER TABLE "sections" ADD CONSTRAINT "sections_practice_key" UNIQUE("practice_id","id");
--> statement-breakpoint
ALTER TABLE "appointments" DROP CONSTRAINT "appointments_project_id_projects_id_fk";
--> statement-breakpoint
ALTER TABLE "appointments" DROP CONSTRAINT "appointments_user_id_users_id_fk";
--> statement-breakpoint
ALTER TABLE "section_versions" DROP CONSTRAINT "section_versions_section_id_sections_id_fk";
--> statement-breakpoint
ALTER TABLE "sections" DROP CONSTRAINT "sections_project_id_projects_id_fk";
--> statement-breakpoint
ALTER TABLE "appointments" ADD CONSTRAINT "appointments_project_fk" FOREIGN KEY ("practice_id","project_id") REFERENCES "public"."projects"("practice_id","id") ON DELETE cascade ON UPDATE no action;
--> statement-breakpoint
ALTER TABLE "appointments" ADD CONSTRAINT "appointments_member_fk" FOREIGN KEY ("practice_id","user_id") REFERENCES "public"."memberships"("practice_id","user_id") ON DELETE cascade ON UPDATE no action;
--> statement-breakpoint
ALTER TABLE "section_versions" ADD CONSTRAINT "section_versions_section_fk" FOREIGN KEY ("practice_id","section_id") REFERENCES "public"."sections"("practice_id","id") ON DELETE cascade ON UPDATE no action;
--> statement-breakpoint
ALTER TABLE "sections" ADD CONSTRAINT "sections_project_fk" FOREIGN KEY ("practice_id","project_id") REFERENCES "public"."projects"("practice_id","id") ON DELETE cascade ON UPDATE no action;
