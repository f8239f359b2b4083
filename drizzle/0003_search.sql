create fulltext index `notes_words` on `notes` (`body`);--> statement-breakpoint
create fulltext index `sweeps_words` on `sweeps` (`title`);--> statement-breakpoint
create fulltext index `files_words` on `files` (`name`);--> statement-breakpoint
create fulltext index `steps_words` on `steps` (`title`, `body`);--> statement-breakpoint
create fulltext index `trails_words` on `trails` (`name`, `verdict_text`);--> statement-breakpoint
create fulltext index `dips_words` on `dips` (`verdict_text`);--> statement-breakpoint
create fulltext index `projects_words` on `projects` (`title`, `summary`);
