CREATE TABLE `bundle_runs` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`kind` varchar(8) NOT NULL,
	`project_id` bigint unsigned,
	`user_id` bigint unsigned,
	`state` varchar(8) NOT NULL,
	`done_parts` int unsigned NOT NULL DEFAULT 0,
	`all_parts` int unsigned NOT NULL DEFAULT 0,
	`storage_key` varchar(120),
	`size_bytes` int unsigned,
	`sha256` char(64),
	`report` json,
	`resume` longblob,
	`created_at` datetime(6) NOT NULL,
	`updated_at` datetime(6) NOT NULL,
	`expires_at` datetime(6),
	CONSTRAINT `bundle_runs_id` PRIMARY KEY(`id`),
	CONSTRAINT `bundle_runs_public_id_unique` UNIQUE(`public_id`)
);
--> statement-breakpoint
CREATE TABLE `plate_forms` (
	`plate_id` bigint unsigned NOT NULL,
	`form` varchar(20) NOT NULL,
	`media_type` varchar(80) NOT NULL,
	`sha256` char(64) NOT NULL,
	`size_bytes` int unsigned NOT NULL,
	`storage_key` varchar(120) NOT NULL,
	`created_at` datetime(6) NOT NULL,
	CONSTRAINT `plate_forms_plate_id_form_pk` PRIMARY KEY(`plate_id`,`form`)
);
--> statement-breakpoint
CREATE TABLE `plate_sources` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`plate_id` bigint unsigned NOT NULL,
	`role` varchar(20) NOT NULL,
	`sweep` varchar(16) NOT NULL,
	`name` varchar(255) NOT NULL,
	`sha256` char(64) NOT NULL,
	`size_bytes` int unsigned NOT NULL,
	`storage_key` varchar(120) NOT NULL,
	`recipe` mediumtext NOT NULL,
	CONSTRAINT `plate_sources_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `plates` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`project_id` bigint unsigned,
	`number` int unsigned NOT NULL,
	`version` int unsigned NOT NULL,
	`previous_id` bigint unsigned,
	`kind` varchar(8) NOT NULL,
	`title` varchar(160) NOT NULL,
	`caption` text NOT NULL,
	`licence` varchar(40) NOT NULL,
	`record` mediumtext NOT NULL,
	`record_sha256` char(64) NOT NULL,
	`created_by` bigint unsigned,
	`created_at` datetime(6) NOT NULL,
	`withdrawn_at` datetime(6),
	`withdrawn_reason` varchar(500) NOT NULL DEFAULT '',
	`withdrawn_by` bigint unsigned,
	CONSTRAINT `plates_id` PRIMARY KEY(`id`),
	CONSTRAINT `plates_public_id_unique` UNIQUE(`public_id`),
	CONSTRAINT `plates_project_number` UNIQUE(`project_id`,`number`,`version`)
);
--> statement-breakpoint
CREATE TABLE `sent_mentions` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`write_up_id` bigint unsigned NOT NULL,
	`target_sha256` char(64) NOT NULL,
	`target` text NOT NULL,
	`endpoint` text,
	`number` int unsigned NOT NULL,
	`state` varchar(8) NOT NULL,
	`reason` varchar(300) NOT NULL DEFAULT '',
	`at` datetime(6) NOT NULL,
	CONSTRAINT `sent_mentions_id` PRIMARY KEY(`id`),
	CONSTRAINT `sent_mentions_target` UNIQUE(`write_up_id`,`target_sha256`)
);
--> statement-breakpoint
CREATE TABLE `webmentions` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`pair_sha256` char(64) NOT NULL,
	`source` text NOT NULL,
	`target` text NOT NULL,
	`plate_id` bigint unsigned,
	`write_up_id` bigint unsigned,
	`state` varchar(8) NOT NULL,
	`title` varchar(300) NOT NULL DEFAULT '',
	`reason` varchar(300) NOT NULL DEFAULT '',
	`received_at` datetime(6) NOT NULL,
	`checked_at` datetime(6),
	`decided_by` bigint unsigned,
	CONSTRAINT `webmentions_id` PRIMARY KEY(`id`),
	CONSTRAINT `webmentions_public_id_unique` UNIQUE(`public_id`),
	CONSTRAINT `webmentions_pair_sha256_unique` UNIQUE(`pair_sha256`)
);
--> statement-breakpoint
CREATE TABLE `write_up_versions` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`write_up_id` bigint unsigned NOT NULL,
	`number` int unsigned NOT NULL,
	`title` varchar(160) NOT NULL,
	`body` mediumtext NOT NULL,
	`remark` varchar(300) NOT NULL,
	`published_by` bigint unsigned,
	`published_at` datetime(6) NOT NULL,
	CONSTRAINT `write_up_versions_id` PRIMARY KEY(`id`),
	CONSTRAINT `write_up_versions_number` UNIQUE(`write_up_id`,`number`)
);
--> statement-breakpoint
CREATE TABLE `write_ups` (
	`id` bigint unsigned AUTO_INCREMENT NOT NULL,
	`public_id` varchar(16) NOT NULL,
	`project_id` bigint unsigned NOT NULL,
	`title` varchar(160) NOT NULL,
	`body` mediumtext NOT NULL,
	`published_number` int unsigned,
	`created_by` bigint unsigned,
	`created_at` datetime(6) NOT NULL,
	`updated_at` datetime(6) NOT NULL,
	CONSTRAINT `write_ups_id` PRIMARY KEY(`id`),
	CONSTRAINT `write_ups_public_id_unique` UNIQUE(`public_id`)
);
--> statement-breakpoint
ALTER TABLE `projects` ADD `licence` varchar(40) DEFAULT 'CC-BY-4.0' NOT NULL;--> statement-breakpoint
ALTER TABLE `bundle_runs` ADD CONSTRAINT `bundle_runs_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `bundle_runs` ADD CONSTRAINT `bundle_runs_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `plate_forms` ADD CONSTRAINT `plate_forms_plate_id_plates_id_fk` FOREIGN KEY (`plate_id`) REFERENCES `plates`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `plate_sources` ADD CONSTRAINT `plate_sources_plate_id_plates_id_fk` FOREIGN KEY (`plate_id`) REFERENCES `plates`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `plates` ADD CONSTRAINT `plates_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `plates` ADD CONSTRAINT `plates_created_by_users_id_fk` FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `plates` ADD CONSTRAINT `plates_withdrawn_by_users_id_fk` FOREIGN KEY (`withdrawn_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sent_mentions` ADD CONSTRAINT `sent_mentions_write_up_id_write_ups_id_fk` FOREIGN KEY (`write_up_id`) REFERENCES `write_ups`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `webmentions` ADD CONSTRAINT `webmentions_plate_id_plates_id_fk` FOREIGN KEY (`plate_id`) REFERENCES `plates`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `webmentions` ADD CONSTRAINT `webmentions_write_up_id_write_ups_id_fk` FOREIGN KEY (`write_up_id`) REFERENCES `write_ups`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `webmentions` ADD CONSTRAINT `webmentions_decided_by_users_id_fk` FOREIGN KEY (`decided_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `write_up_versions` ADD CONSTRAINT `write_up_versions_write_up_id_write_ups_id_fk` FOREIGN KEY (`write_up_id`) REFERENCES `write_ups`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `write_up_versions` ADD CONSTRAINT `write_up_versions_published_by_users_id_fk` FOREIGN KEY (`published_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `write_ups` ADD CONSTRAINT `write_ups_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `write_ups` ADD CONSTRAINT `write_ups_created_by_users_id_fk` FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `bundle_runs_project` ON `bundle_runs` (`project_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `bundle_runs_user` ON `bundle_runs` (`user_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `plate_sources_plate` ON `plate_sources` (`plate_id`);--> statement-breakpoint
CREATE INDEX `plate_sources_key` ON `plate_sources` (`storage_key`);--> statement-breakpoint
CREATE INDEX `plates_previous` ON `plates` (`previous_id`);--> statement-breakpoint
CREATE INDEX `webmentions_plate` ON `webmentions` (`plate_id`,`state`);--> statement-breakpoint
CREATE INDEX `webmentions_write_up` ON `webmentions` (`write_up_id`,`state`);--> statement-breakpoint
CREATE INDEX `write_up_versions_at` ON `write_up_versions` (`published_at`);--> statement-breakpoint
CREATE INDEX `write_ups_project` ON `write_ups` (`project_id`,`updated_at`);