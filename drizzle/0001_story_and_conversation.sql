CREATE TABLE `antenna_versions` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`number` int unsigned NOT NULL,
	`valid_from` datetime(6) NOT NULL,
	`content` json NOT NULL,
	`remark` varchar(300) NOT NULL,
	`step_id` bigint unsigned,
	`created_by` bigint unsigned,
	`created_at` datetime(6) NOT NULL,
	CONSTRAINT `antenna_versions_id` PRIMARY KEY(`id`),
	CONSTRAINT `antenna_versions_public_id_unique` UNIQUE(`public_id`),
	CONSTRAINT `antenna_versions_number` UNIQUE(`project_id`,`number`)
);
--> statement-breakpoint
CREATE TABLE `photographs` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`bench_id` bigint unsigned,
	`step_id` bigint unsigned,
	`caption` varchar(300) NOT NULL,
	`name` varchar(255) NOT NULL,
	`size_bytes` int unsigned NOT NULL,
	`sha256` char(64) NOT NULL,
	`storage_key` varchar(120) NOT NULL,
	`shown_key` varchar(120) NOT NULL,
	`small_key` varchar(120) NOT NULL,
	`width` int unsigned NOT NULL,
	`height` int unsigned NOT NULL,
	`created_by` bigint unsigned,
	`created_at` datetime(6) NOT NULL,
	CONSTRAINT `photographs_id` PRIMARY KEY(`id`),
	CONSTRAINT `photographs_public_id_unique` UNIQUE(`public_id`)
);
--> statement-breakpoint
CREATE TABLE `steps` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`title` varchar(160) NOT NULL,
	`body` text NOT NULL,
	`state` varchar(8) NOT NULL,
	`at` datetime(6),
	`quantities` json NOT NULL,
	`before_sweep_id` bigint unsigned,
	`after_sweep_id` bigint unsigned,
	`expected` json NOT NULL,
	`created_by` bigint unsigned,
	`created_at` datetime(6) NOT NULL,
	`updated_at` datetime(6) NOT NULL,
	CONSTRAINT `steps_id` PRIMARY KEY(`id`),
	CONSTRAINT `steps_public_id_unique` UNIQUE(`public_id`)
);
--> statement-breakpoint
CREATE TABLE `bench_references` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`version_id` bigint unsigned NOT NULL,
	`kind` varchar(8) NOT NULL,
	`sweep_id` bigint unsigned NOT NULL,
	`created_at` datetime(6) NOT NULL,
	CONSTRAINT `bench_references_id` PRIMARY KEY(`id`),
	CONSTRAINT `bench_references_kind` UNIQUE(`version_id`,`kind`)
);
--> statement-breakpoint
CREATE TABLE `bench_versions` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`bench_id` bigint unsigned NOT NULL,
	`number` int unsigned NOT NULL,
	`valid_from` datetime(6) NOT NULL,
	`remark` varchar(300) NOT NULL,
	`parts` json NOT NULL,
	`standards` json NOT NULL,
	`given` json NOT NULL,
	`created_by` bigint unsigned,
	`created_at` datetime(6) NOT NULL,
	CONSTRAINT `bench_versions_id` PRIMARY KEY(`id`),
	CONSTRAINT `bench_versions_public_id_unique` UNIQUE(`public_id`),
	CONSTRAINT `bench_versions_number` UNIQUE(`bench_id`,`number`)
);
--> statement-breakpoint
CREATE TABLE `benches` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`owner_id` bigint unsigned,
	`name` varchar(120) NOT NULL,
	`description` text NOT NULL,
	`created_by` bigint unsigned,
	`created_at` datetime(6) NOT NULL,
	`updated_at` datetime(6) NOT NULL,
	`retired_at` datetime(6),
	CONSTRAINT `benches_id` PRIMARY KEY(`id`),
	CONSTRAINT `benches_public_id_unique` UNIQUE(`public_id`)
);
--> statement-breakpoint
CREATE TABLE `cables` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`name` varchar(80) NOT NULL,
	`k1` double NOT NULL,
	`k2` double NOT NULL,
	`velocity_factor` double NOT NULL,
	`points` json,
	`source` varchar(300) NOT NULL,
	`created_by` bigint unsigned,
	`created_at` datetime(6) NOT NULL,
	CONSTRAINT `cables_id` PRIMARY KEY(`id`),
	CONSTRAINT `cables_public_id_unique` UNIQUE(`public_id`),
	CONSTRAINT `cables_project_name` UNIQUE(`project_id`,`name`)
);
--> statement-breakpoint
CREATE TABLE `events` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`kind` varchar(30) NOT NULL,
	`actor_id` bigint unsigned,
	`about` json NOT NULL,
	`at` datetime(6) NOT NULL,
	CONSTRAINT `events_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `feed_tokens` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`user_id` bigint unsigned NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`token_hash` char(64) NOT NULL,
	`created_at` datetime(6) NOT NULL,
	`last_used_at` datetime(6),
	`revoked_at` datetime(6),
	CONSTRAINT `feed_tokens_id` PRIMARY KEY(`id`),
	CONSTRAINT `feed_tokens_public_id_unique` UNIQUE(`public_id`),
	CONSTRAINT `feed_tokens_token_hash_unique` UNIQUE(`token_hash`)
);
--> statement-breakpoint
CREATE TABLE `follows` (
	`user_id` bigint unsigned NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`kind` varchar(8) NOT NULL,
	`subject` varchar(16) NOT NULL,
	`muted` boolean NOT NULL,
	`at` datetime(6) NOT NULL,
	CONSTRAINT `follows_user_id_kind_subject_pk` PRIMARY KEY(`user_id`,`kind`,`subject`)
);
--> statement-breakpoint
CREATE TABLE `notices` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`user_id` bigint unsigned NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`event_id` bigint unsigned NOT NULL,
	`note_id` bigint unsigned,
	`reason` varchar(10) NOT NULL,
	`created_at` datetime(6) NOT NULL,
	`read_at` datetime(6),
	`mailed_at` datetime(6),
	CONSTRAINT `notices_id` PRIMARY KEY(`id`),
	CONSTRAINT `notices_public_id_unique` UNIQUE(`public_id`),
	CONSTRAINT `notices_user_event` UNIQUE(`user_id`,`event_id`)
);
--> statement-breakpoint
CREATE TABLE `presence` (
	`id` char(64) NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`user_id` bigint unsigned NOT NULL,
	`kind` varchar(8) NOT NULL,
	`subject` varchar(16) NOT NULL,
	`at` datetime(6) NOT NULL,
	CONSTRAINT `presence_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `mail_choices` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`user_id` bigint unsigned NOT NULL,
	`project_id` bigint unsigned,
	`scope` varchar(16) NOT NULL,
	`mode` varchar(6) NOT NULL,
	`at` datetime(6) NOT NULL,
	CONSTRAINT `mail_choices_id` PRIMARY KEY(`id`),
	CONSTRAINT `mail_choices_scope` UNIQUE(`user_id`,`scope`)
);
--> statement-breakpoint
CREATE TABLE `outbox` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`message_id` varchar(190) NOT NULL,
	`once_key` varchar(190),
	`to_address` varchar(254) NOT NULL,
	`user_id` bigint unsigned,
	`subject` varchar(300) NOT NULL,
	`text` mediumtext NOT NULL,
	`html` mediumtext NOT NULL,
	`headers` json NOT NULL,
	`state` varchar(8) NOT NULL,
	`attempts` int NOT NULL DEFAULT 0,
	`next_at` datetime(6) NOT NULL,
	`locked_until` datetime(6),
	`last_error` text,
	`created_at` datetime(6) NOT NULL,
	`sent_at` datetime(6),
	CONSTRAINT `outbox_id` PRIMARY KEY(`id`),
	CONSTRAINT `outbox_public_id_unique` UNIQUE(`public_id`),
	CONSTRAINT `outbox_message_id_unique` UNIQUE(`message_id`),
	CONSTRAINT `outbox_once` UNIQUE(`once_key`)
);
--> statement-breakpoint
CREATE TABLE `unsubscribe_tokens` (
	`token_hash` char(64) NOT NULL,
	`user_id` bigint unsigned NOT NULL,
	`project_id` bigint unsigned,
	`created_at` datetime(6) NOT NULL,
	`used_at` datetime(6),
	CONSTRAINT `unsubscribe_tokens_token_hash` PRIMARY KEY(`token_hash`)
);
--> statement-breakpoint
CREATE TABLE `attachments` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`note_id` bigint unsigned,
	`name` varchar(255) NOT NULL,
	`media_type` varchar(80) NOT NULL,
	`size_bytes` int unsigned NOT NULL,
	`sha256` char(64) NOT NULL,
	`storage_key` varchar(120) NOT NULL,
	`shown_key` varchar(120),
	`small_key` varchar(120),
	`width` int unsigned,
	`height` int unsigned,
	`uploaded_by` bigint unsigned,
	`created_at` datetime(6) NOT NULL,
	CONSTRAINT `attachments_id` PRIMARY KEY(`id`),
	CONSTRAINT `attachments_public_id_unique` UNIQUE(`public_id`)
);
--> statement-breakpoint
CREATE TABLE `note_references` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`note_id` bigint unsigned NOT NULL,
	`kind` varchar(8) NOT NULL,
	`subject` varchar(16) NOT NULL,
	`text` varchar(300) NOT NULL,
	CONSTRAINT `note_references_id` PRIMARY KEY(`id`),
	CONSTRAINT `note_references_subject` UNIQUE(`note_id`,`kind`,`subject`)
);
--> statement-breakpoint
CREATE TABLE `note_versions` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`note_id` bigint unsigned NOT NULL,
	`body` mediumtext NOT NULL,
	`from_at` datetime(6) NOT NULL,
	`until_at` datetime(6) NOT NULL,
	`edited_by` bigint unsigned,
	CONSTRAINT `note_versions_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `reports` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`note_id` bigint unsigned NOT NULL,
	`reason` varchar(500) NOT NULL,
	`reported_by` bigint unsigned,
	`created_at` datetime(6) NOT NULL,
	`closed_at` datetime(6),
	`closed_by` bigint unsigned,
	`outcome` varchar(300) NOT NULL DEFAULT '',
	CONSTRAINT `reports_id` PRIMARY KEY(`id`),
	CONSTRAINT `reports_public_id_unique` UNIQUE(`public_id`)
);
--> statement-breakpoint
CREATE TABLE `blocks` (
	`blocker_id` bigint unsigned NOT NULL,
	`blocked_id` bigint unsigned NOT NULL,
	`at` datetime(6) NOT NULL,
	CONSTRAINT `blocks_blocker_id_blocked_id_pk` PRIMARY KEY(`blocker_id`,`blocked_id`)
);
--> statement-breakpoint
CREATE TABLE `email_codes` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`ask_hash` char(64) NOT NULL,
	`email` varchar(254) NOT NULL,
	`code_hash` char(64) NOT NULL,
	`attempts` tinyint NOT NULL DEFAULT 0,
	`for_user_id` bigint unsigned,
	`created_at` datetime(6) NOT NULL,
	`expires_at` datetime(6) NOT NULL,
	`used_at` datetime(6),
	CONSTRAINT `email_codes_id` PRIMARY KEY(`id`),
	CONSTRAINT `email_codes_ask_hash_unique` UNIQUE(`ask_hash`)
);
--> statement-breakpoint
CREATE TABLE `invitations` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`role` varchar(12) NOT NULL,
	`email` varchar(254),
	`token_hash` char(64) NOT NULL,
	`created_by` bigint unsigned,
	`created_at` datetime(6) NOT NULL,
	`expires_at` datetime(6) NOT NULL,
	`revoked_at` datetime(6),
	`accepted_by` bigint unsigned,
	`accepted_at` datetime(6),
	`uses` int unsigned NOT NULL DEFAULT 0,
	CONSTRAINT `invitations_id` PRIMARY KEY(`id`),
	CONSTRAINT `invitations_public_id_unique` UNIQUE(`public_id`),
	CONSTRAINT `invitations_token_hash_unique` UNIQUE(`token_hash`)
);
--> statement-breakpoint
CREATE TABLE `trail_decisions` (
	`one_id` bigint unsigned NOT NULL,
	`other_id` bigint unsigned NOT NULL,
	`decision` varchar(6) NOT NULL,
	`decided_by` bigint unsigned,
	`at` datetime(6) NOT NULL,
	CONSTRAINT `trail_decisions_one_id_other_id_pk` PRIMARY KEY(`one_id`,`other_id`)
);
--> statement-breakpoint
CREATE TABLE `trail_dips` (
	`dip_id` bigint unsigned NOT NULL,
	`trail_id` bigint unsigned NOT NULL,
	CONSTRAINT `trail_dips_dip_id` PRIMARY KEY(`dip_id`)
);
--> statement-breakpoint
CREATE TABLE `trails` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`name` varchar(80) NOT NULL DEFAULT '',
	`frequency_hz` double NOT NULL,
	`verdict` varchar(10) NOT NULL DEFAULT 'open',
	`verdict_text` varchar(300) NOT NULL DEFAULT '',
	`verdict_by` bigint unsigned,
	`verdict_at` datetime(6),
	`created_at` datetime(6) NOT NULL,
	CONSTRAINT `trails_id` PRIMARY KEY(`id`),
	CONSTRAINT `trails_public_id_unique` UNIQUE(`public_id`)
);
--> statement-breakpoint
CREATE TABLE `verdict_events` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`dip_id` bigint unsigned,
	`trail_id` bigint unsigned,
	`verdict` varchar(10) NOT NULL,
	`text` varchar(300) NOT NULL,
	`evidence` json NOT NULL,
	`given_by` bigint unsigned,
	`at` datetime(6) NOT NULL,
	CONSTRAINT `verdict_events_id` PRIMARY KEY(`id`),
	CONSTRAINT `verdict_events_public_id_unique` UNIQUE(`public_id`)
);
--> statement-breakpoint
ALTER TABLE `notes` ADD `trail_id` bigint unsigned;--> statement-breakpoint
ALTER TABLE `notes` ADD `step_id` bigint unsigned;--> statement-breakpoint
ALTER TABLE `notes` ADD `bench_id` bigint unsigned;--> statement-breakpoint
ALTER TABLE `notes` ADD `from_hz` double;--> statement-breakpoint
ALTER TABLE `notes` ADD `to_hz` double;--> statement-breakpoint
ALTER TABLE `notes` ADD `region` json;--> statement-breakpoint
ALTER TABLE `users` ADD `length_unit` varchar(4) DEFAULT 'm' NOT NULL;--> statement-breakpoint
ALTER TABLE `users` ADD `call_sign` varchar(20) DEFAULT '' NOT NULL;--> statement-breakpoint
ALTER TABLE `users` ADD `itu_region` tinyint;--> statement-breakpoint
ALTER TABLE `users` ADD `time_zone` varchar(60) DEFAULT 'UTC' NOT NULL;--> statement-breakpoint
ALTER TABLE `users` ADD `closed_at` datetime(6);--> statement-breakpoint
ALTER TABLE `memberships` ADD `last_active_at` datetime(6);--> statement-breakpoint
ALTER TABLE `memberships` ADD `seen_event_id` bigint unsigned;--> statement-breakpoint
ALTER TABLE `analyses` ADD `correction` json;--> statement-breakpoint
ALTER TABLE `sweeps` ADD `purpose` varchar(10) DEFAULT 'antenna' NOT NULL;--> statement-breakpoint
ALTER TABLE `sweeps` ADD `bench_id` bigint unsigned;--> statement-breakpoint
ALTER TABLE `sweeps` ADD `feedline` json;--> statement-breakpoint
ALTER TABLE `sweeps` ADD `repeat_group` varchar(16);--> statement-breakpoint
ALTER TABLE `antenna_versions` ADD CONSTRAINT `antenna_versions_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `antenna_versions` ADD CONSTRAINT `antenna_versions_step_id_steps_id_fk` FOREIGN KEY (`step_id`) REFERENCES `steps`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `antenna_versions` ADD CONSTRAINT `antenna_versions_created_by_users_id_fk` FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `photographs` ADD CONSTRAINT `photographs_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `photographs` ADD CONSTRAINT `photographs_bench_id_benches_id_fk` FOREIGN KEY (`bench_id`) REFERENCES `benches`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `photographs` ADD CONSTRAINT `photographs_step_id_steps_id_fk` FOREIGN KEY (`step_id`) REFERENCES `steps`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `photographs` ADD CONSTRAINT `photographs_created_by_users_id_fk` FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `steps` ADD CONSTRAINT `steps_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `steps` ADD CONSTRAINT `steps_before_sweep_id_sweeps_id_fk` FOREIGN KEY (`before_sweep_id`) REFERENCES `sweeps`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `steps` ADD CONSTRAINT `steps_after_sweep_id_sweeps_id_fk` FOREIGN KEY (`after_sweep_id`) REFERENCES `sweeps`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `steps` ADD CONSTRAINT `steps_created_by_users_id_fk` FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `bench_references` ADD CONSTRAINT `bench_references_version_id_bench_versions_id_fk` FOREIGN KEY (`version_id`) REFERENCES `bench_versions`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `bench_references` ADD CONSTRAINT `bench_references_sweep_id_sweeps_id_fk` FOREIGN KEY (`sweep_id`) REFERENCES `sweeps`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `bench_versions` ADD CONSTRAINT `bench_versions_bench_id_benches_id_fk` FOREIGN KEY (`bench_id`) REFERENCES `benches`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `bench_versions` ADD CONSTRAINT `bench_versions_created_by_users_id_fk` FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `benches` ADD CONSTRAINT `benches_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `benches` ADD CONSTRAINT `benches_owner_id_users_id_fk` FOREIGN KEY (`owner_id`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `benches` ADD CONSTRAINT `benches_created_by_users_id_fk` FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `cables` ADD CONSTRAINT `cables_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `cables` ADD CONSTRAINT `cables_created_by_users_id_fk` FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `events` ADD CONSTRAINT `events_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `events` ADD CONSTRAINT `events_actor_id_users_id_fk` FOREIGN KEY (`actor_id`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `feed_tokens` ADD CONSTRAINT `feed_tokens_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `feed_tokens` ADD CONSTRAINT `feed_tokens_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `follows` ADD CONSTRAINT `follows_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `follows` ADD CONSTRAINT `follows_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `notices` ADD CONSTRAINT `notices_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `notices` ADD CONSTRAINT `notices_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `notices` ADD CONSTRAINT `notices_event_id_events_id_fk` FOREIGN KEY (`event_id`) REFERENCES `events`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `notices` ADD CONSTRAINT `notices_note_id_notes_id_fk` FOREIGN KEY (`note_id`) REFERENCES `notes`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `presence` ADD CONSTRAINT `presence_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `presence` ADD CONSTRAINT `presence_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `mail_choices` ADD CONSTRAINT `mail_choices_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `mail_choices` ADD CONSTRAINT `mail_choices_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `outbox` ADD CONSTRAINT `outbox_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `unsubscribe_tokens` ADD CONSTRAINT `unsubscribe_tokens_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `unsubscribe_tokens` ADD CONSTRAINT `unsubscribe_tokens_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `attachments` ADD CONSTRAINT `attachments_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `attachments` ADD CONSTRAINT `attachments_note_id_notes_id_fk` FOREIGN KEY (`note_id`) REFERENCES `notes`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `attachments` ADD CONSTRAINT `attachments_uploaded_by_users_id_fk` FOREIGN KEY (`uploaded_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `note_references` ADD CONSTRAINT `note_references_note_id_notes_id_fk` FOREIGN KEY (`note_id`) REFERENCES `notes`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `note_versions` ADD CONSTRAINT `note_versions_note_id_notes_id_fk` FOREIGN KEY (`note_id`) REFERENCES `notes`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `note_versions` ADD CONSTRAINT `note_versions_edited_by_users_id_fk` FOREIGN KEY (`edited_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `reports` ADD CONSTRAINT `reports_note_id_notes_id_fk` FOREIGN KEY (`note_id`) REFERENCES `notes`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `reports` ADD CONSTRAINT `reports_reported_by_users_id_fk` FOREIGN KEY (`reported_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `reports` ADD CONSTRAINT `reports_closed_by_users_id_fk` FOREIGN KEY (`closed_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `blocks` ADD CONSTRAINT `blocks_blocker_id_users_id_fk` FOREIGN KEY (`blocker_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `blocks` ADD CONSTRAINT `blocks_blocked_id_users_id_fk` FOREIGN KEY (`blocked_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `email_codes` ADD CONSTRAINT `email_codes_for_user_id_users_id_fk` FOREIGN KEY (`for_user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `invitations` ADD CONSTRAINT `invitations_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `invitations` ADD CONSTRAINT `invitations_created_by_users_id_fk` FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `invitations` ADD CONSTRAINT `invitations_accepted_by_users_id_fk` FOREIGN KEY (`accepted_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `trail_decisions` ADD CONSTRAINT `trail_decisions_one_id_dips_id_fk` FOREIGN KEY (`one_id`) REFERENCES `dips`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `trail_decisions` ADD CONSTRAINT `trail_decisions_other_id_dips_id_fk` FOREIGN KEY (`other_id`) REFERENCES `dips`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `trail_decisions` ADD CONSTRAINT `trail_decisions_decided_by_users_id_fk` FOREIGN KEY (`decided_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `trail_dips` ADD CONSTRAINT `trail_dips_dip_id_dips_id_fk` FOREIGN KEY (`dip_id`) REFERENCES `dips`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `trail_dips` ADD CONSTRAINT `trail_dips_trail_id_trails_id_fk` FOREIGN KEY (`trail_id`) REFERENCES `trails`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `trails` ADD CONSTRAINT `trails_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `trails` ADD CONSTRAINT `trails_verdict_by_users_id_fk` FOREIGN KEY (`verdict_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `verdict_events` ADD CONSTRAINT `verdict_events_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `verdict_events` ADD CONSTRAINT `verdict_events_dip_id_dips_id_fk` FOREIGN KEY (`dip_id`) REFERENCES `dips`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `verdict_events` ADD CONSTRAINT `verdict_events_trail_id_trails_id_fk` FOREIGN KEY (`trail_id`) REFERENCES `trails`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `verdict_events` ADD CONSTRAINT `verdict_events_given_by_users_id_fk` FOREIGN KEY (`given_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `antenna_versions_from` ON `antenna_versions` (`project_id`,`valid_from`);--> statement-breakpoint
CREATE INDEX `photographs_project` ON `photographs` (`project_id`);--> statement-breakpoint
CREATE INDEX `photographs_bench` ON `photographs` (`bench_id`);--> statement-breakpoint
CREATE INDEX `photographs_step` ON `photographs` (`step_id`);--> statement-breakpoint
CREATE INDEX `steps_project` ON `steps` (`project_id`,`at`);--> statement-breakpoint
CREATE INDEX `bench_references_sweep` ON `bench_references` (`sweep_id`);--> statement-breakpoint
CREATE INDEX `bench_versions_from` ON `bench_versions` (`bench_id`,`valid_from`);--> statement-breakpoint
CREATE INDEX `benches_project` ON `benches` (`project_id`);--> statement-breakpoint
CREATE INDEX `benches_owner` ON `benches` (`owner_id`);--> statement-breakpoint
CREATE INDEX `events_project` ON `events` (`project_id`,`id`);--> statement-breakpoint
CREATE INDEX `events_at` ON `events` (`at`);--> statement-breakpoint
CREATE INDEX `feed_tokens_user` ON `feed_tokens` (`user_id`,`project_id`);--> statement-breakpoint
CREATE INDEX `follows_subject` ON `follows` (`project_id`,`kind`,`subject`);--> statement-breakpoint
CREATE INDEX `notices_unread` ON `notices` (`user_id`,`read_at`,`created_at`);--> statement-breakpoint
CREATE INDEX `notices_unmailed` ON `notices` (`mailed_at`,`created_at`);--> statement-breakpoint
CREATE INDEX `presence_project` ON `presence` (`project_id`,`at`);--> statement-breakpoint
CREATE INDEX `outbox_due` ON `outbox` (`state`,`next_at`);--> statement-breakpoint
CREATE INDEX `unsubscribe_tokens_user` ON `unsubscribe_tokens` (`user_id`);--> statement-breakpoint
CREATE INDEX `attachments_note` ON `attachments` (`note_id`);--> statement-breakpoint
CREATE INDEX `attachments_project` ON `attachments` (`project_id`);--> statement-breakpoint
CREATE INDEX `note_versions_note` ON `note_versions` (`note_id`,`until_at`);--> statement-breakpoint
CREATE INDEX `reports_open` ON `reports` (`closed_at`,`created_at`);--> statement-breakpoint
CREATE INDEX `blocks_blocked` ON `blocks` (`blocked_id`);--> statement-breakpoint
CREATE INDEX `email_codes_expires` ON `email_codes` (`expires_at`);--> statement-breakpoint
CREATE INDEX `invitations_project` ON `invitations` (`project_id`);--> statement-breakpoint
CREATE INDEX `trail_decisions_other` ON `trail_decisions` (`other_id`);--> statement-breakpoint
CREATE INDEX `trail_dips_trail` ON `trail_dips` (`trail_id`);--> statement-breakpoint
CREATE INDEX `trails_project` ON `trails` (`project_id`,`frequency_hz`);--> statement-breakpoint
CREATE INDEX `verdict_events_dip` ON `verdict_events` (`dip_id`,`at`);--> statement-breakpoint
CREATE INDEX `verdict_events_trail` ON `verdict_events` (`trail_id`,`at`);--> statement-breakpoint
ALTER TABLE `notes` ADD CONSTRAINT `notes_trail_id_trails_id_fk` FOREIGN KEY (`trail_id`) REFERENCES `trails`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `notes` ADD CONSTRAINT `notes_step_id_steps_id_fk` FOREIGN KEY (`step_id`) REFERENCES `steps`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `notes` ADD CONSTRAINT `notes_bench_id_benches_id_fk` FOREIGN KEY (`bench_id`) REFERENCES `benches`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `notes_trail` ON `notes` (`trail_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `notes_step` ON `notes` (`step_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `notes_bench` ON `notes` (`bench_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `notes_author` ON `notes` (`author_id`);--> statement-breakpoint
CREATE INDEX `sweeps_bench` ON `sweeps` (`bench_id`);--> statement-breakpoint
CREATE INDEX `sweeps_repeat` ON `sweeps` (`project_id`,`repeat_group`);