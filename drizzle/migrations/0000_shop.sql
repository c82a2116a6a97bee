CREATE TABLE `assignments` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`lesson_id` text NOT NULL,
	`user_id` text NOT NULL,
	`assigned_by` text NOT NULL,
	`due_on` text NOT NULL,
	`note` text DEFAULT '' NOT NULL,
	`created_at` integer NOT NULL,
	`withdrawn_at` integer,
	FOREIGN KEY (`shop_id`,`lesson_id`) REFERENCES `lessons`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`user_id`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`assigned_by`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `assignments_open` ON `assignments` (`lesson_id`,`user_id`) WHERE withdrawn_at is null;--> statement-breakpoint
CREATE INDEX `assignments_user` ON `assignments` (`user_id`);--> statement-breakpoint
CREATE INDEX `assignments_shop` ON `assignments` (`shop_id`,`due_on`);--> statement-breakpoint
CREATE UNIQUE INDEX `assignments_shop_and_id` ON `assignments` (`shop_id`,`id`);--> statement-breakpoint
CREATE TABLE `answers` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`attempt_id` text NOT NULL,
	`question_version_id` text NOT NULL,
	`text` text NOT NULL,
	`unit` text DEFAULT '' NOT NULL,
	`outcome` text NOT NULL,
	`right` integer NOT NULL,
	`factor` real,
	`feedback` text NOT NULL,
	`at` integer NOT NULL,
	FOREIGN KEY (`shop_id`,`attempt_id`) REFERENCES `attempts`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`question_version_id`) REFERENCES `question_versions`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `answers_question` ON `answers` (`question_version_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `answers_once` ON `answers` (`attempt_id`,`question_version_id`);--> statement-breakpoint
CREATE TABLE `attempts` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`lesson_id` text NOT NULL,
	`revision_id` text NOT NULL,
	`user_id` text NOT NULL,
	`started_at` integer NOT NULL,
	`submitted_at` integer,
	`typed` text NOT NULL,
	`right_count` integer,
	`asked_count` integer,
	`score` real,
	`pass_mark` real,
	`passed` integer,
	FOREIGN KEY (`shop_id`,`lesson_id`) REFERENCES `lessons`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`revision_id`) REFERENCES `revisions`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`user_id`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `attempts_user` ON `attempts` (`user_id`,`lesson_id`);--> statement-breakpoint
CREATE INDEX `attempts_lesson` ON `attempts` (`lesson_id`,`submitted_at`);--> statement-breakpoint
CREATE UNIQUE INDEX `attempts_shop_and_id` ON `attempts` (`shop_id`,`id`);--> statement-breakpoint
CREATE TABLE `audit_log` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`user_id` text,
	`actor` text NOT NULL,
	`action` text NOT NULL,
	`noun` text NOT NULL,
	`noun_id` text DEFAULT '' NOT NULL,
	`detail` text DEFAULT '' NOT NULL,
	`at` integer NOT NULL,
	FOREIGN KEY (`shop_id`) REFERENCES `shops`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `audit_log_shop` ON `audit_log` (`shop_id`,`at`);--> statement-breakpoint
CREATE TABLE `caption_tracks` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`recording_id` text NOT NULL,
	`language` text DEFAULT 'en' NOT NULL,
	`label` text DEFAULT 'English' NOT NULL,
	`file_name` text NOT NULL,
	`original` text NOT NULL,
	`warnings` text NOT NULL,
	`created_by` text NOT NULL,
	`created_at` integer NOT NULL,
	`published_at` integer,
	`replaced_at` integer,
	FOREIGN KEY (`shop_id`,`recording_id`) REFERENCES `recordings`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`created_by`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `caption_tracks_recording` ON `caption_tracks` (`recording_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `caption_tracks_shop_and_id` ON `caption_tracks` (`shop_id`,`id`);--> statement-breakpoint
CREATE TABLE `cues` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`track_id` text NOT NULL,
	`n` integer NOT NULL,
	`start_ms` integer NOT NULL,
	`end_ms` integer NOT NULL,
	`text` text NOT NULL,
	`identifier` text DEFAULT '' NOT NULL,
	FOREIGN KEY (`shop_id`,`track_id`) REFERENCES `caption_tracks`(`shop_id`,`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `cues_track_and_n` ON `cues` (`track_id`,`n`);--> statement-breakpoint
CREATE TABLE `chapters` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`lesson_id` text NOT NULL,
	`recording_id` text NOT NULL,
	`start_ms` integer NOT NULL,
	`end_ms` integer NOT NULL,
	`title` text NOT NULL,
	`phase` text,
	`state` text DEFAULT 'inked' NOT NULL,
	FOREIGN KEY (`shop_id`,`lesson_id`) REFERENCES `lessons`(`shop_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`shop_id`,`recording_id`) REFERENCES `recordings`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	CONSTRAINT "chapters_forward" CHECK("chapters"."end_ms" > "chapters"."start_ms")
);
--> statement-breakpoint
CREATE INDEX `chapters_lesson` ON `chapters` (`lesson_id`,`start_ms`);--> statement-breakpoint
CREATE UNIQUE INDEX `chapters_shop_and_id` ON `chapters` (`shop_id`,`id`);--> statement-breakpoint
CREATE TABLE `clip_cuts` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`clip_id` text NOT NULL,
	`from_ms` integer NOT NULL,
	`to_ms` integer NOT NULL,
	FOREIGN KEY (`shop_id`,`clip_id`) REFERENCES `clips`(`shop_id`,`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `clip_cuts_clip` ON `clip_cuts` (`clip_id`);--> statement-breakpoint
CREATE TABLE `clips` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`lesson_id` text NOT NULL,
	`recording_id` text NOT NULL,
	`n` integer NOT NULL,
	`in_ms` integer NOT NULL,
	`out_ms` integer NOT NULL,
	FOREIGN KEY (`shop_id`,`lesson_id`) REFERENCES `lessons`(`shop_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`shop_id`,`recording_id`) REFERENCES `recordings`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `clips_lesson` ON `clips` (`lesson_id`,`n`);--> statement-breakpoint
CREATE INDEX `clips_recording` ON `clips` (`recording_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `clips_shop_and_id` ON `clips` (`shop_id`,`id`);--> statement-breakpoint
CREATE TABLE `citations` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`document_id` text NOT NULL,
	`place` text DEFAULT '' NOT NULL,
	`read_on` text NOT NULL,
	`read_by` text,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`shop_id`,`document_id`) REFERENCES `documents`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`read_by`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `citations_document` ON `citations` (`document_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `citations_shop_and_id` ON `citations` (`shop_id`,`id`);--> statement-breakpoint
CREATE TABLE `documents` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`kind` text NOT NULL,
	`title` text NOT NULL,
	`edition` text DEFAULT '' NOT NULL,
	`dated` text DEFAULT '' NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`shop_id`) REFERENCES `shops`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `documents_shop` ON `documents` (`shop_id`,`title`);--> statement-breakpoint
CREATE UNIQUE INDEX `documents_shop_and_id` ON `documents` (`shop_id`,`id`);--> statement-breakpoint
CREATE TABLE `invitations` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`email` text NOT NULL,
	`name` text NOT NULL,
	`role` text NOT NULL,
	`token_hash` text NOT NULL,
	`invited_by` text NOT NULL,
	`created_at` integer NOT NULL,
	`sent_at` integer NOT NULL,
	`expires_at` integer NOT NULL,
	`accepted_at` integer,
	`withdrawn_at` integer,
	FOREIGN KEY (`shop_id`,`invited_by`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `invitations_tokenHash_unique` ON `invitations` (`token_hash`);--> statement-breakpoint
CREATE INDEX `invitations_email` ON `invitations` (`shop_id`,`email`);--> statement-breakpoint
CREATE UNIQUE INDEX `invitations_shop_and_id` ON `invitations` (`shop_id`,`id`);--> statement-breakpoint
CREATE TABLE `lesson_vehicles` (
	`shop_id` text NOT NULL,
	`lesson_id` text NOT NULL,
	`vehicle_id` text NOT NULL,
	PRIMARY KEY(`lesson_id`, `vehicle_id`),
	FOREIGN KEY (`shop_id`,`lesson_id`) REFERENCES `lessons`(`shop_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`shop_id`,`vehicle_id`) REFERENCES `vehicles`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `lesson_vehicles_vehicle` ON `lesson_vehicles` (`vehicle_id`);--> statement-breakpoint
CREATE TABLE `lessons` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`title` text NOT NULL,
	`summary` text DEFAULT '' NOT NULL,
	`system` text NOT NULL,
	`position` text DEFAULT '' NOT NULL,
	`version` integer DEFAULT 1 NOT NULL,
	`newest_revision` integer,
	`created_by` text NOT NULL,
	`created_at` integer NOT NULL,
	`changed_at` integer NOT NULL,
	`withdrawn_at` integer,
	FOREIGN KEY (`shop_id`) REFERENCES `shops`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`created_by`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `lessons_shop` ON `lessons` (`shop_id`,`system`);--> statement-breakpoint
CREATE UNIQUE INDEX `lessons_shop_and_id` ON `lessons` (`shop_id`,`id`);--> statement-breakpoint
CREATE TABLE `checks` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`mark_id` text NOT NULL,
	`fingerprint` text NOT NULL,
	`citation_id` text,
	`checker_id` text NOT NULL,
	`outcome` text NOT NULL,
	`own_work` integer DEFAULT false NOT NULL,
	`reason` text DEFAULT '' NOT NULL,
	`at` integer NOT NULL,
	`on` text NOT NULL,
	FOREIGN KEY (`shop_id`,`mark_id`) REFERENCES `marks`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`citation_id`) REFERENCES `citations`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`checker_id`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `checks_mark` ON `checks` (`mark_id`,`at`);--> statement-breakpoint
CREATE TABLE `doubts` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`lesson_id` text NOT NULL,
	`mark_id` text NOT NULL,
	`raised_by` text NOT NULL,
	`stops` integer NOT NULL,
	`reason` text NOT NULL,
	`at` integer NOT NULL,
	`cleared_by` text,
	`cleared_at` integer,
	`cleared_reason` text DEFAULT '' NOT NULL,
	FOREIGN KEY (`shop_id`,`lesson_id`) REFERENCES `lessons`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`mark_id`) REFERENCES `marks`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`raised_by`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`cleared_by`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `doubts_mark` ON `doubts` (`mark_id`);--> statement-breakpoint
CREATE INDEX `doubts_open` ON `doubts` (`shop_id`,`cleared_at`);--> statement-breakpoint
CREATE UNIQUE INDEX `doubts_shop_and_id` ON `doubts` (`shop_id`,`id`);--> statement-breakpoint
CREATE TABLE `mark_values` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`mark_id` text NOT NULL,
	`n` integer NOT NULL,
	`role` text NOT NULL,
	`action` text,
	`hardware` text DEFAULT 'either' NOT NULL,
	`text` text NOT NULL,
	`dimension` text,
	`unit` text,
	`value` real,
	`number` real,
	FOREIGN KEY (`shop_id`,`mark_id`) REFERENCES `marks`(`shop_id`,`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `mark_values_mark_and_n` ON `mark_values` (`mark_id`,`n`);--> statement-breakpoint
CREATE TABLE `marks` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`lesson_id` text NOT NULL,
	`chapter_id` text NOT NULL,
	`recording_id` text NOT NULL,
	`at_ms` integer NOT NULL,
	`kind` text NOT NULL,
	`state` text NOT NULL,
	`version` integer DEFAULT 1 NOT NULL,
	`component` text DEFAULT '' NOT NULL,
	`component_key` text DEFAULT '' NOT NULL,
	`side` text DEFAULT 'none' NOT NULL,
	`position` text DEFAULT '' NOT NULL,
	`applies_year_from` integer,
	`applies_year_to` integer,
	`applies_engine` text DEFAULT '' NOT NULL,
	`applies_drive` text DEFAULT '' NOT NULL,
	`applies_variant` text DEFAULT '' NOT NULL,
	`variant_question` text DEFAULT '' NOT NULL,
	`safety_critical` integer DEFAULT false NOT NULL,
	`needs` text DEFAULT '' NOT NULL,
	`note` text DEFAULT '' NOT NULL,
	`thread` text DEFAULT '' NOT NULL,
	`property_class` text DEFAULT '' NOT NULL,
	`condition` text DEFAULT 'not-stated' NOT NULL,
	`condition_detail` text DEFAULT '' NOT NULL,
	`reuse` text DEFAULT 'not-stated' NOT NULL,
	`reuse_detail` text DEFAULT '' NOT NULL,
	`tighten_at` text DEFAULT 'not-stated' NOT NULL,
	`run_down` text DEFAULT 'not-stated' NOT NULL,
	`check_again` text DEFAULT 'not-stated' NOT NULL,
	`check_again_detail` text DEFAULT '' NOT NULL,
	`thread_direction` text DEFAULT 'not-stated' NOT NULL,
	`wheel_load` text DEFAULT 'not-stated' NOT NULL,
	`sequence` text DEFAULT '' NOT NULL,
	`tightened_state` text DEFAULT '' NOT NULL,
	`tool_name` text DEFAULT '' NOT NULL,
	`part_number` text DEFAULT '' NOT NULL,
	`part_rule` text DEFAULT 'not-stated' NOT NULL,
	`quantity` text DEFAULT '' NOT NULL,
	`product` text DEFAULT '' NOT NULL,
	`signal_word` text,
	`words` text DEFAULT '' NOT NULL,
	`reason` text DEFAULT '' NOT NULL,
	`replaces` text DEFAULT '' NOT NULL,
	`said` text DEFAULT '' NOT NULL,
	`read_rule` text DEFAULT '' NOT NULL,
	`confidence` real,
	`citation_id` text,
	`created_by` text,
	`created_at` integer NOT NULL,
	`inked_by` text,
	`inked_at` integer,
	`changed_at` integer NOT NULL,
	`erased_at` integer,
	FOREIGN KEY (`shop_id`,`lesson_id`) REFERENCES `lessons`(`shop_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`shop_id`,`chapter_id`) REFERENCES `chapters`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`recording_id`) REFERENCES `recordings`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`citation_id`) REFERENCES `citations`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`created_by`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`inked_by`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `marks_lesson` ON `marks` (`lesson_id`,`recording_id`,`at_ms`);--> statement-breakpoint
CREATE INDEX `marks_chapter` ON `marks` (`chapter_id`);--> statement-breakpoint
CREATE INDEX `marks_component` ON `marks` (`shop_id`,`component_key`);--> statement-breakpoint
CREATE UNIQUE INDEX `marks_shop_and_id` ON `marks` (`shop_id`,`id`);--> statement-breakpoint
CREATE TABLE `outbox` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`message_id` text NOT NULL,
	`recipient` text NOT NULL,
	`subject` text NOT NULL,
	`text` text NOT NULL,
	`created_at` integer NOT NULL,
	`sent_at` integer,
	FOREIGN KEY (`shop_id`) REFERENCES `shops`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `outbox_messageId_unique` ON `outbox` (`message_id`);--> statement-breakpoint
CREATE INDEX `outbox_shop` ON `outbox` (`shop_id`,`created_at`);--> statement-breakpoint
CREATE TABLE `password_resets` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`user_id` text NOT NULL,
	`token_hash` text NOT NULL,
	`created_at` integer NOT NULL,
	`expires_at` integer NOT NULL,
	`used_at` integer,
	FOREIGN KEY (`shop_id`,`user_id`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `password_resets_tokenHash_unique` ON `password_resets` (`token_hash`);--> statement-breakpoint
CREATE INDEX `password_resets_user` ON `password_resets` (`user_id`);--> statement-breakpoint
CREATE TABLE `question_versions` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`question_id` text NOT NULL,
	`revision_id` text NOT NULL,
	`n` integer NOT NULL,
	`prompt` text NOT NULL,
	`safety_critical` integer DEFAULT false NOT NULL,
	`recording_id` text NOT NULL,
	`at_ms` integer NOT NULL,
	`asked` text NOT NULL,
	`choices` text,
	FOREIGN KEY (`shop_id`,`question_id`) REFERENCES `questions`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`revision_id`) REFERENCES `revisions`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `question_versions_revision` ON `question_versions` (`revision_id`,`n`);--> statement-breakpoint
CREATE UNIQUE INDEX `question_versions_shop_and_id` ON `question_versions` (`shop_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `question_versions_once` ON `question_versions` (`question_id`,`revision_id`);--> statement-breakpoint
CREATE TABLE `questions` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`lesson_id` text NOT NULL,
	`mark_id` text NOT NULL,
	`kind` text NOT NULL,
	`created_at` integer NOT NULL,
	`retired_at` integer,
	FOREIGN KEY (`shop_id`,`lesson_id`) REFERENCES `lessons`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`mark_id`) REFERENCES `marks`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `questions_lesson` ON `questions` (`lesson_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `questions_shop_and_id` ON `questions` (`shop_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `questions_mark_and_kind` ON `questions` (`mark_id`,`kind`);--> statement-breakpoint
CREATE TABLE `recordings` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`title` text NOT NULL,
	`file_name` text NOT NULL,
	`size_bytes` integer NOT NULL,
	`last_modified` integer DEFAULT 0 NOT NULL,
	`state` text NOT NULL,
	`state_reason` text DEFAULT '' NOT NULL,
	`object_key` text NOT NULL,
	`upload_id` text,
	`part_bytes` integer NOT NULL,
	`play_key` text,
	`container` text,
	`video_codec` text,
	`audio_codec` text,
	`width` integer,
	`height` integer,
	`rotation` integer,
	`duration_ms` integer,
	`poster_key` text,
	`storyboard_key` text,
	`peaks` text,
	`uploaded_by` text NOT NULL,
	`created_at` integer NOT NULL,
	`ready_at` integer,
	`deleted_at` integer,
	FOREIGN KEY (`shop_id`) REFERENCES `shops`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`uploaded_by`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `recordings_objectKey_unique` ON `recordings` (`object_key`);--> statement-breakpoint
CREATE INDEX `recordings_shop` ON `recordings` (`shop_id`,`deleted_at`);--> statement-breakpoint
CREATE UNIQUE INDEX `recordings_shop_and_id` ON `recordings` (`shop_id`,`id`);--> statement-breakpoint
CREATE TABLE `revisions` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`lesson_id` text NOT NULL,
	`n` integer NOT NULL,
	`format` integer NOT NULL,
	`snapshot` text NOT NULL,
	`note` text DEFAULT '' NOT NULL,
	`published_by` text NOT NULL,
	`published_at` integer NOT NULL,
	FOREIGN KEY (`shop_id`,`lesson_id`) REFERENCES `lessons`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`published_by`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `revisions_shop` ON `revisions` (`shop_id`,`published_at`);--> statement-breakpoint
CREATE UNIQUE INDEX `revisions_shop_and_id` ON `revisions` (`shop_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `revisions_lesson_and_n` ON `revisions` (`lesson_id`,`n`);--> statement-breakpoint
CREATE TABLE `sessions` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`user_id` text NOT NULL,
	`token_hash` text NOT NULL,
	`device` text DEFAULT '' NOT NULL,
	`created_at` integer NOT NULL,
	`last_seen_at` integer NOT NULL,
	`expires_at` integer NOT NULL,
	FOREIGN KEY (`shop_id`,`user_id`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `sessions_tokenHash_unique` ON `sessions` (`token_hash`);--> statement-breakpoint
CREATE INDEX `sessions_user` ON `sessions` (`user_id`);--> statement-breakpoint
CREATE TABLE `shops` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`country` text DEFAULT 'US' NOT NULL,
	`time_zone` text DEFAULT 'America/Chicago' NOT NULL,
	`preferred_units` text DEFAULT 'inch' NOT NULL,
	`pass_mark` real DEFAULT 0.8 NOT NULL,
	`watch_threshold` real DEFAULT 0.9 NOT NULL,
	`shown_jobs` integer DEFAULT 2 NOT NULL,
	`created_at` integer NOT NULL
);
--> statement-breakpoint
CREATE TABLE `sign_off_requests` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`lesson_id` text NOT NULL,
	`user_id` text NOT NULL,
	`done_on` text NOT NULL,
	`note` text DEFAULT '' NOT NULL,
	`created_at` integer NOT NULL,
	`answered_at` integer,
	`withdrawn_at` integer,
	FOREIGN KEY (`shop_id`,`lesson_id`) REFERENCES `lessons`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`user_id`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `sign_off_requests_open` ON `sign_off_requests` (`shop_id`,`answered_at`);--> statement-breakpoint
CREATE INDEX `sign_off_requests_user` ON `sign_off_requests` (`user_id`,`lesson_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `sign_off_requests_shop_and_id` ON `sign_off_requests` (`shop_id`,`id`);--> statement-breakpoint
CREATE TABLE `sign_off_revocations` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`sign_off_id` text NOT NULL,
	`revoked_by` text NOT NULL,
	`reason` text NOT NULL,
	`at` integer NOT NULL,
	FOREIGN KEY (`shop_id`,`sign_off_id`) REFERENCES `sign_offs`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`revoked_by`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `sign_off_revocations_signOffId_unique` ON `sign_off_revocations` (`sign_off_id`);--> statement-breakpoint
CREATE TABLE `sign_offs` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`lesson_id` text NOT NULL,
	`revision_id` text NOT NULL,
	`user_id` text NOT NULL,
	`signed_by` text NOT NULL,
	`request_id` text,
	`level` text NOT NULL,
	`presence` text NOT NULL,
	`shown_on` text NOT NULL,
	`values_set` text DEFAULT '' NOT NULL,
	`note` text DEFAULT '' NOT NULL,
	`at` integer NOT NULL,
	FOREIGN KEY (`shop_id`,`lesson_id`) REFERENCES `lessons`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`revision_id`) REFERENCES `revisions`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`user_id`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`signed_by`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`request_id`) REFERENCES `sign_off_requests`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `sign_offs_user` ON `sign_offs` (`user_id`,`lesson_id`);--> statement-breakpoint
CREATE INDEX `sign_offs_shop` ON `sign_offs` (`shop_id`,`at`);--> statement-breakpoint
CREATE UNIQUE INDEX `sign_offs_shop_and_id` ON `sign_offs` (`shop_id`,`id`);--> statement-breakpoint
CREATE TABLE `tasks` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`kind` text NOT NULL,
	`payload` text NOT NULL,
	`dedupe_key` text,
	`run_at` integer NOT NULL,
	`attempts` integer DEFAULT 0 NOT NULL,
	`lease_until` integer,
	`last_error` text,
	`created_at` integer NOT NULL,
	`done_at` integer,
	`failed_at` integer,
	FOREIGN KEY (`shop_id`) REFERENCES `shops`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `tasks_dedupeKey_unique` ON `tasks` (`dedupe_key`);--> statement-breakpoint
CREATE INDEX `tasks_due` ON `tasks` (`done_at`,`failed_at`,`run_at`);--> statement-breakpoint
CREATE INDEX `tasks_shop` ON `tasks` (`shop_id`,`failed_at`);--> statement-breakpoint
CREATE TABLE `users` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`email` text NOT NULL,
	`name` text NOT NULL,
	`role` text NOT NULL,
	`password_hash` text NOT NULL,
	`preferred_units` text,
	`mail_assignments` integer DEFAULT true NOT NULL,
	`mail_questions` integer DEFAULT true NOT NULL,
	`created_at` integer NOT NULL,
	`left_at` integer,
	`pseudonymised_at` integer,
	FOREIGN KEY (`shop_id`) REFERENCES `shops`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `users_email_unique` ON `users` (`email`);--> statement-breakpoint
CREATE INDEX `users_shop` ON `users` (`shop_id`,`left_at`);--> statement-breakpoint
CREATE UNIQUE INDEX `users_shop_and_id` ON `users` (`shop_id`,`id`);--> statement-breakpoint
CREATE TABLE `vehicles` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`make` text NOT NULL,
	`model` text NOT NULL,
	`year_from` integer,
	`year_to` integer,
	`engine` text DEFAULT '' NOT NULL,
	`drive` text DEFAULT '' NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`shop_id`) REFERENCES `shops`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `vehicles_shop` ON `vehicles` (`shop_id`,`make`,`model`);--> statement-breakpoint
CREATE UNIQUE INDEX `vehicles_shop_and_id` ON `vehicles` (`shop_id`,`id`);--> statement-breakpoint
CREATE TABLE `watched_stretches` (
	`id` text PRIMARY KEY NOT NULL,
	`shop_id` text NOT NULL,
	`user_id` text NOT NULL,
	`lesson_id` text NOT NULL,
	`revision_id` text NOT NULL,
	`recording_id` text NOT NULL,
	`from_ms` integer NOT NULL,
	`to_ms` integer NOT NULL,
	`at` integer NOT NULL,
	FOREIGN KEY (`shop_id`,`user_id`) REFERENCES `users`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`lesson_id`) REFERENCES `lessons`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`revision_id`) REFERENCES `revisions`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`shop_id`,`recording_id`) REFERENCES `recordings`(`shop_id`,`id`) ON UPDATE no action ON DELETE restrict,
	CONSTRAINT "watched_stretches_forward" CHECK("watched_stretches"."to_ms" > "watched_stretches"."from_ms")
);
--> statement-breakpoint
CREATE INDEX `watched_stretches_user` ON `watched_stretches` (`user_id`,`lesson_id`,`at`);--> statement-breakpoint
CREATE INDEX `watched_stretches_lesson` ON `watched_stretches` (`lesson_id`);