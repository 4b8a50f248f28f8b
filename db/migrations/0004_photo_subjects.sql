CREATE TABLE `__new_photos` (
	`id` text PRIMARY KEY NOT NULL,
	`subject_kind` text NOT NULL,
	`subject_id` text NOT NULL,
	`purpose` text NOT NULL,
	`visibility` text NOT NULL,
	`owner_id` text NOT NULL,
	`added_at` integer NOT NULL,
	`original_key` text NOT NULL,
	`large_key` text NOT NULL,
	`thumb_key` text NOT NULL,
	`width` integer NOT NULL,
	`height` integer NOT NULL,
	`bytes` integer NOT NULL,
	`lab_l` integer,
	`lab_a` integer,
	`lab_b` integer,
	`removed_at` integer,
	`removed_by` text,
	`files_deleted_at` integer,
	FOREIGN KEY (`owner_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`removed_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "photos_subject_kind" CHECK("__new_photos"."subject_kind" in ('weigh-in', 'lot', 'sorting', 'step', 'count', 'removal')),
	CONSTRAINT "photos_purpose" CHECK("__new_photos"."purpose" in ('view', 'chip')),
	CONSTRAINT "photos_visibility" CHECK("__new_photos"."visibility" in ('shed', 'host', 'public')),
	CONSTRAINT "photos_size" CHECK("__new_photos"."width" > 0 and "__new_photos"."height" > 0 and "__new_photos"."bytes" > 0),
	CONSTRAINT "photos_colour" CHECK(("__new_photos"."lab_l" is null) = ("__new_photos"."lab_a" is null) and ("__new_photos"."lab_l" is null) = ("__new_photos"."lab_b" is null)),
	CONSTRAINT "photos_removed" CHECK("__new_photos"."files_deleted_at" is null or "__new_photos"."removed_at" is not null),
	CONSTRAINT "photos_whole_numbers" CHECK(typeof("__new_photos"."width") in ('integer', 'null') and typeof("__new_photos"."height") in ('integer', 'null') and typeof("__new_photos"."bytes") in ('integer', 'null') and typeof("__new_photos"."lab_l") in ('integer', 'null') and typeof("__new_photos"."lab_a") in ('integer', 'null') and typeof("__new_photos"."lab_b") in ('integer', 'null') and typeof("__new_photos"."added_at") in ('integer', 'null') and typeof("__new_photos"."removed_at") in ('integer', 'null') and typeof("__new_photos"."files_deleted_at") in ('integer', 'null'))
);
--> statement-breakpoint
INSERT INTO `__new_photos`("id", "subject_kind", "subject_id", "purpose", "visibility", "owner_id", "added_at", "original_key", "large_key", "thumb_key", "width", "height", "bytes", "lab_l", "lab_a", "lab_b", "removed_at", "removed_by", "files_deleted_at") SELECT "id", "subject_kind", "subject_id", "purpose", "visibility", "owner_id", "added_at", "original_key", "large_key", "thumb_key", "width", "height", "bytes", "lab_l", "lab_a", "lab_b", "removed_at", "removed_by", "files_deleted_at" FROM `photos`;--> statement-breakpoint
DROP TABLE `photos`;--> statement-breakpoint
ALTER TABLE `__new_photos` RENAME TO `photos`;--> statement-breakpoint
CREATE UNIQUE INDEX `photos_original_key_unique` ON `photos` (`original_key`);--> statement-breakpoint
CREATE UNIQUE INDEX `photos_large_key_unique` ON `photos` (`large_key`);--> statement-breakpoint
CREATE UNIQUE INDEX `photos_thumb_key_unique` ON `photos` (`thumb_key`);--> statement-breakpoint
CREATE INDEX `photos_subject` ON `photos` (`subject_kind`,`subject_id`,`added_at`);--> statement-breakpoint
CREATE INDEX `photos_files_to_delete` ON `photos` (`removed_at`) WHERE "photos"."removed_at" is not null and "photos"."files_deleted_at" is null;--> statement-breakpoint
CREATE UNIQUE INDEX `photos_one_chip` ON `photos` (`subject_kind`,`subject_id`) WHERE "photos"."purpose" = 'chip' and "photos"."removed_at" is null;--> statement-breakpoint
CREATE INDEX `audit_events_at` ON `audit_events` (`at`);