CREATE INDEX `holders_runs` ON `holders` (`id`) WHERE "holders"."kind" = 'run';--> statement-breakpoint
CREATE INDEX `lines_runs` ON `lines` (`entry_id`,`grams`) WHERE "lines"."account" = 'run';