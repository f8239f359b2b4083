ALTER TABLE `write_up_versions` ADD `frozen` mediumtext NOT NULL;--> statement-breakpoint
ALTER TABLE `write_ups` ADD `taken_back_at` datetime(6);