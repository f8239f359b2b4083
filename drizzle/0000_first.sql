CREATE TABLE `notes` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`sweep_id` bigint unsigned,
	`dip_id` bigint unsigned,
	`parent_id` bigint unsigned,
	`author_id` bigint unsigned,
	`body` mediumtext NOT NULL,
	`created_at` datetime(6) NOT NULL,
	`edited_at` datetime(6),
	`removed_at` datetime(6),
	`removed_by` bigint unsigned,
	`client_key` varchar(40),
	CONSTRAINT `notes_id` PRIMARY KEY(`id`),
	CONSTRAINT `notes_public_id_unique` UNIQUE(`public_id`),
	CONSTRAINT `notes_client_key_unique` UNIQUE(`client_key`)
);
--> statement-breakpoint
CREATE TABLE `api_tokens` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`user_id` bigint unsigned NOT NULL,
	`label` varchar(80) NOT NULL,
	`scope` varchar(10) NOT NULL,
	`token_hash` char(64) NOT NULL,
	`created_at` datetime(6) NOT NULL,
	`last_used_at` datetime(6),
	`revoked_at` datetime(6),
	CONSTRAINT `api_tokens_id` PRIMARY KEY(`id`),
	CONSTRAINT `api_tokens_public_id_unique` UNIQUE(`public_id`),
	CONSTRAINT `api_tokens_token_hash_unique` UNIQUE(`token_hash`)
);
--> statement-breakpoint
CREATE TABLE `dismissals` (
	`user_id` bigint unsigned NOT NULL,
	`caution` varchar(40) NOT NULL,
	`at` datetime(6) NOT NULL,
	CONSTRAINT `dismissals_user_id_caution_pk` PRIMARY KEY(`user_id`,`caution`)
);
--> statement-breakpoint
CREATE TABLE `identities` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`user_id` bigint unsigned NOT NULL,
	`provider` varchar(20) NOT NULL,
	`subject` varchar(190) NOT NULL,
	`created_at` datetime(6) NOT NULL,
	CONSTRAINT `identities_id` PRIMARY KEY(`id`),
	CONSTRAINT `identities_provider_subject` UNIQUE(`provider`,`subject`)
);
--> statement-breakpoint
CREATE TABLE `sessions` (
	`id` char(64) NOT NULL,
	`user_id` bigint unsigned,
	`data` json NOT NULL,
	`user_agent` varchar(200),
	`created_at` datetime(6) NOT NULL,
	`last_seen_at` datetime(6) NOT NULL,
	`expires_at` datetime(6) NOT NULL,
	CONSTRAINT `sessions_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `users` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`user_name` varchar(40) NOT NULL,
	`name` varchar(120) NOT NULL,
	`email` varchar(254),
	`administrator` boolean NOT NULL DEFAULT false,
	`created_at` datetime(6) NOT NULL,
	`last_seen_at` datetime(6),
	`suspended_at` datetime(6),
	CONSTRAINT `users_id` PRIMARY KEY(`id`),
	CONSTRAINT `users_public_id_unique` UNIQUE(`public_id`),
	CONSTRAINT `users_user_name_unique` UNIQUE(`user_name`)
);
--> statement-breakpoint
CREATE TABLE `design_bands` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`name` varchar(40) NOT NULL,
	`low_hz` double NOT NULL,
	`high_hz` double NOT NULL,
	`swr_limit` double NOT NULL,
	CONSTRAINT `design_bands_id` PRIMARY KEY(`id`),
	CONSTRAINT `design_bands_public_id_unique` UNIQUE(`public_id`)
);
--> statement-breakpoint
CREATE TABLE `memberships` (
	`project_id` bigint unsigned NOT NULL,
	`user_id` bigint unsigned NOT NULL,
	`role` varchar(12) NOT NULL,
	`created_at` datetime(6) NOT NULL,
	CONSTRAINT `memberships_project_id_user_id_pk` PRIMARY KEY(`project_id`,`user_id`)
);
--> statement-breakpoint
CREATE TABLE `projects` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`title` varchar(160) NOT NULL,
	`summary` text NOT NULL,
	`visibility` varchar(10) NOT NULL,
	`itu_region` tinyint,
	`demo` tinyint NOT NULL DEFAULT 0,
	`created_at` datetime(6) NOT NULL,
	`updated_at` datetime(6) NOT NULL,
	CONSTRAINT `projects_id` PRIMARY KEY(`id`),
	CONSTRAINT `projects_public_id_unique` UNIQUE(`public_id`)
);
--> statement-breakpoint
CREATE TABLE `analyses` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`sweep_id` bigint unsigned NOT NULL,
	`reading_id` bigint unsigned NOT NULL,
	`number` int unsigned NOT NULL,
	`version` varchar(20) NOT NULL,
	`settings` json NOT NULL,
	`noise_db` double,
	`warnings` json NOT NULL,
	`dips` json NOT NULL,
	`created_by` bigint unsigned,
	`created_at` datetime(6) NOT NULL,
	CONSTRAINT `analyses_id` PRIMARY KEY(`id`),
	CONSTRAINT `analyses_public_id_unique` UNIQUE(`public_id`),
	CONSTRAINT `analyses_sweep_number` UNIQUE(`sweep_id`,`number`)
);
--> statement-breakpoint
CREATE TABLE `dips` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`sweep_id` bigint unsigned NOT NULL,
	`present` boolean NOT NULL,
	`frequency_hz` double NOT NULL,
	`minimum_swr` double,
	`return_loss_db` double NOT NULL,
	`prominence_db` double NOT NULL,
	`numbers` json NOT NULL,
	`verdict` varchar(10) NOT NULL DEFAULT 'open',
	`verdict_text` varchar(300) NOT NULL DEFAULT '',
	`verdict_by` bigint unsigned,
	`verdict_at` datetime(6),
	`created_at` datetime(6) NOT NULL,
	CONSTRAINT `dips_id` PRIMARY KEY(`id`),
	CONSTRAINT `dips_public_id_unique` UNIQUE(`public_id`)
);
--> statement-breakpoint
CREATE TABLE `files` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`name` varchar(255) NOT NULL,
	`size_bytes` int unsigned NOT NULL,
	`sha256` char(64) NOT NULL,
	`storage_key` varchar(120) NOT NULL,
	`uploaded_by` bigint unsigned,
	`created_at` datetime(6) NOT NULL,
	CONSTRAINT `files_id` PRIMARY KEY(`id`),
	CONSTRAINT `files_public_id_unique` UNIQUE(`public_id`),
	CONSTRAINT `files_project_sha256` UNIQUE(`project_id`,`sha256`)
);
--> statement-breakpoint
CREATE TABLE `readings` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`sweep_id` bigint unsigned NOT NULL,
	`number` int unsigned NOT NULL,
	`given` json NOT NULL,
	`reading` json,
	`shape` varchar(190),
	`created_by` bigint unsigned,
	`created_at` datetime(6) NOT NULL,
	CONSTRAINT `readings_id` PRIMARY KEY(`id`),
	CONSTRAINT `readings_public_id_unique` UNIQUE(`public_id`),
	CONSTRAINT `readings_sweep_number` UNIQUE(`sweep_id`,`number`)
);
--> statement-breakpoint
CREATE TABLE `sweep_points` (
	`reading_id` bigint unsigned NOT NULL,
	`part` smallint NOT NULL,
	`data` longblob NOT NULL,
	CONSTRAINT `sweep_points_reading_id_part_pk` PRIMARY KEY(`reading_id`,`part`)
);
--> statement-breakpoint
CREATE TABLE `sweeps` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`file_id` bigint unsigned NOT NULL,
	`title` varchar(160) NOT NULL,
	`taken_at` datetime(6),
	`created_by` bigint unsigned,
	`created_at` datetime(6) NOT NULL,
	`reading_id` bigint unsigned,
	`analysis_id` bigint unsigned,
	`problem` json,
	`point_count` int unsigned,
	`start_hz` double,
	`stop_hz` double,
	`reference_ohm` double,
	`complex` boolean,
	`preview` longblob,
	CONSTRAINT `sweeps_id` PRIMARY KEY(`id`),
	CONSTRAINT `sweeps_public_id_unique` UNIQUE(`public_id`)
);
--> statement-breakpoint
CREATE TABLE `facts` (
	`name` varchar(60) NOT NULL,
	`value` json NOT NULL,
	`at` datetime(6) NOT NULL,
	CONSTRAINT `facts_name` PRIMARY KEY(`name`)
);
--> statement-breakpoint
CREATE TABLE `jobs` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`kind` varchar(40) NOT NULL,
	`payload` json NOT NULL,
	`run_at` datetime(6) NOT NULL,
	`attempts` int NOT NULL DEFAULT 0,
	`locked_until` datetime(6),
	`last_error` text,
	`created_at` datetime(6) NOT NULL,
	CONSTRAINT `jobs_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `rate_limits` (
	`key` varchar(255) NOT NULL,
	`points` int NOT NULL DEFAULT 0,
	`expire` bigint unsigned,
	CONSTRAINT `rate_limits_key` PRIMARY KEY(`key`)
);
--> statement-breakpoint
ALTER TABLE `notes` ADD CONSTRAINT `notes_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `notes` ADD CONSTRAINT `notes_sweep_id_sweeps_id_fk` FOREIGN KEY (`sweep_id`) REFERENCES `sweeps`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `notes` ADD CONSTRAINT `notes_dip_id_dips_id_fk` FOREIGN KEY (`dip_id`) REFERENCES `dips`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `notes` ADD CONSTRAINT `notes_author_id_users_id_fk` FOREIGN KEY (`author_id`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `notes` ADD CONSTRAINT `notes_removed_by_users_id_fk` FOREIGN KEY (`removed_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `notes` ADD CONSTRAINT `notes_parent` FOREIGN KEY (`parent_id`) REFERENCES `notes`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `api_tokens` ADD CONSTRAINT `api_tokens_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `dismissals` ADD CONSTRAINT `dismissals_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `identities` ADD CONSTRAINT `identities_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sessions` ADD CONSTRAINT `sessions_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `design_bands` ADD CONSTRAINT `design_bands_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `memberships` ADD CONSTRAINT `memberships_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `memberships` ADD CONSTRAINT `memberships_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `analyses` ADD CONSTRAINT `analyses_sweep_id_sweeps_id_fk` FOREIGN KEY (`sweep_id`) REFERENCES `sweeps`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `analyses` ADD CONSTRAINT `analyses_reading_id_readings_id_fk` FOREIGN KEY (`reading_id`) REFERENCES `readings`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `analyses` ADD CONSTRAINT `analyses_created_by_users_id_fk` FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `dips` ADD CONSTRAINT `dips_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `dips` ADD CONSTRAINT `dips_sweep_id_sweeps_id_fk` FOREIGN KEY (`sweep_id`) REFERENCES `sweeps`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `dips` ADD CONSTRAINT `dips_verdict_by_users_id_fk` FOREIGN KEY (`verdict_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `files` ADD CONSTRAINT `files_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `files` ADD CONSTRAINT `files_uploaded_by_users_id_fk` FOREIGN KEY (`uploaded_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `readings` ADD CONSTRAINT `readings_sweep_id_sweeps_id_fk` FOREIGN KEY (`sweep_id`) REFERENCES `sweeps`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `readings` ADD CONSTRAINT `readings_created_by_users_id_fk` FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sweep_points` ADD CONSTRAINT `sweep_points_reading_id_readings_id_fk` FOREIGN KEY (`reading_id`) REFERENCES `readings`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sweeps` ADD CONSTRAINT `sweeps_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sweeps` ADD CONSTRAINT `sweeps_file_id_files_id_fk` FOREIGN KEY (`file_id`) REFERENCES `files`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sweeps` ADD CONSTRAINT `sweeps_created_by_users_id_fk` FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `notes_dip` ON `notes` (`dip_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `notes_sweep` ON `notes` (`sweep_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `notes_project` ON `notes` (`project_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `api_tokens_user` ON `api_tokens` (`user_id`);--> statement-breakpoint
CREATE INDEX `sessions_user` ON `sessions` (`user_id`);--> statement-breakpoint
CREATE INDEX `sessions_expires` ON `sessions` (`expires_at`);--> statement-breakpoint
CREATE INDEX `design_bands_project` ON `design_bands` (`project_id`);--> statement-breakpoint
CREATE INDEX `memberships_user` ON `memberships` (`user_id`);--> statement-breakpoint
CREATE INDEX `projects_visibility` ON `projects` (`visibility`,`updated_at`);--> statement-breakpoint
CREATE INDEX `dips_sweep` ON `dips` (`sweep_id`,`frequency_hz`);--> statement-breakpoint
CREATE INDEX `dips_project_frequency` ON `dips` (`project_id`,`frequency_hz`);--> statement-breakpoint
CREATE INDEX `dips_project_verdict` ON `dips` (`project_id`,`verdict`);--> statement-breakpoint
CREATE INDEX `readings_shape` ON `readings` (`shape`);--> statement-breakpoint
CREATE INDEX `sweeps_project` ON `sweeps` (`project_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `sweeps_taken` ON `sweeps` (`project_id`,`taken_at`);--> statement-breakpoint
CREATE INDEX `sweeps_file` ON `sweeps` (`file_id`);--> statement-breakpoint
CREATE INDEX `jobs_due` ON `jobs` (`run_at`);