CREATE TABLE `audit_events` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`at` integer NOT NULL,
	`actor` text,
	`action` text NOT NULL,
	`subject_kind` text NOT NULL,
	`subject_id` text NOT NULL,
	`fields` text NOT NULL,
	`act_id` integer,
	CONSTRAINT "audit_events_whole_numbers" CHECK(typeof("audit_events"."at") in ('integer', 'null') and typeof("audit_events"."act_id") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE INDEX `audit_events_subject` ON `audit_events` (`subject_kind`,`subject_id`);--> statement-breakpoint
CREATE TABLE `audit_values` (
	`event_id` integer NOT NULL,
	`field` text NOT NULL,
	`value` text,
	PRIMARY KEY(`event_id`, `field`),
	FOREIGN KEY (`event_id`) REFERENCES `audit_events`(`id`) ON UPDATE no action ON DELETE no action
) WITHOUT ROWID;
--> statement-breakpoint
CREATE TABLE `bags` (
	`id` text PRIMARY KEY NOT NULL,
	`code` text NOT NULL,
	`point_id` text,
	`order_id` text,
	`state` text NOT NULL,
	`state_since` integer NOT NULL,
	`printed_at` integer NOT NULL,
	FOREIGN KEY (`point_id`) REFERENCES `points`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`order_id`) REFERENCES `tag_orders`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "bags_state" CHECK("bags"."state" in ('printed', 'out', 'picked-up', 'weighed', 'sorted', 'closed')),
	CONSTRAINT "bags_whole_numbers" CHECK(typeof("bags"."state_since") in ('integer', 'null') and typeof("bags"."printed_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `bags_code_unique` ON `bags` (`code`);--> statement-breakpoint
CREATE INDEX `bags_state_since` ON `bags` (`state`,`state_since`);--> statement-breakpoint
CREATE INDEX `bags_order` ON `bags` (`order_id`);--> statement-breakpoint
CREATE INDEX `bags_point` ON `bags` (`point_id`);--> statement-breakpoint
CREATE TABLE `labels` (
	`code` text PRIMARY KEY NOT NULL,
	`kind` text NOT NULL,
	`subject` text NOT NULL,
	`made_at` integer NOT NULL,
	CONSTRAINT "labels_kind" CHECK("labels"."kind" in ('bag', 'lot', 'container', 'run', 'batch')),
	CONSTRAINT "labels_whole_numbers" CHECK(typeof("labels"."made_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE INDEX `labels_subject` ON `labels` (`subject`);--> statement-breakpoint
CREATE TABLE `tag_orders` (
	`id` text PRIMARY KEY NOT NULL,
	`point_id` text,
	`count` integer NOT NULL,
	`ordered_by` text,
	`ordered_at` integer NOT NULL,
	FOREIGN KEY (`point_id`) REFERENCES `points`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "tag_orders_whole_numbers" CHECK(typeof("tag_orders"."count") in ('integer', 'null') and typeof("tag_orders"."ordered_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE INDEX `tag_orders_ordered_at` ON `tag_orders` (`ordered_at`);--> statement-breakpoint
CREATE TABLE `account_links` (
	`token_hash` text PRIMARY KEY NOT NULL,
	`person_id` text NOT NULL,
	`purpose` text NOT NULL,
	`created_at` integer NOT NULL,
	`expires_at` integer NOT NULL,
	`used_at` integer,
	FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "account_links_whole_numbers" CHECK(typeof("account_links"."created_at") in ('integer', 'null') and typeof("account_links"."expires_at") in ('integer', 'null') and typeof("account_links"."used_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE INDEX `account_links_person` ON `account_links` (`person_id`);--> statement-breakpoint
CREATE TABLE `people` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`email` text,
	`role` text NOT NULL,
	`locale` text DEFAULT 'en' NOT NULL,
	`password_hash` text,
	`invited_at` integer NOT NULL,
	`joined_at` integer,
	`removed_at` integer,
	CONSTRAINT "people_role" CHECK("people"."role" in ('donor', 'volunteer', 'lead', 'coordinator')),
	CONSTRAINT "people_whole_numbers" CHECK(typeof("people"."invited_at") in ('integer', 'null') and typeof("people"."joined_at") in ('integer', 'null') and typeof("people"."removed_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `people_email_unique` ON `people` (`email`);--> statement-breakpoint
CREATE TABLE `sessions` (
	`id` text PRIMARY KEY NOT NULL,
	`person_id` text NOT NULL,
	`created_at` integer NOT NULL,
	`expires_at` integer NOT NULL,
	`ended_at` integer,
	FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "sessions_whole_numbers" CHECK(typeof("sessions"."created_at") in ('integer', 'null') and typeof("sessions"."expires_at") in ('integer', 'null') and typeof("sessions"."ended_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE INDEX `sessions_person` ON `sessions` (`person_id`);--> statement-breakpoint
CREATE TABLE `sign_in_failures` (
	`key` text PRIMARY KEY NOT NULL,
	`failures` integer NOT NULL,
	`last_at` integer NOT NULL,
	`blocked_until` integer NOT NULL,
	CONSTRAINT "sign_in_failures_whole_numbers" CHECK(typeof("sign_in_failures"."failures") in ('integer', 'null') and typeof("sign_in_failures"."last_at") in ('integer', 'null') and typeof("sign_in_failures"."blocked_until") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE TABLE `balances` (
	`holder_id` integer NOT NULL,
	`material_id` integer NOT NULL,
	`grams` integer NOT NULL,
	PRIMARY KEY(`holder_id`, `material_id`),
	FOREIGN KEY (`holder_id`) REFERENCES `holders`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`material_id`) REFERENCES `materials`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "balances_not_negative" CHECK("balances"."grams" >= 0),
	CONSTRAINT "balances_whole_numbers" CHECK(typeof("balances"."holder_id") in ('integer', 'null') and typeof("balances"."material_id") in ('integer', 'null') and typeof("balances"."grams") in ('integer', 'null'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE INDEX `balances_held` ON `balances` (`material_id`,`holder_id`,`grams`) WHERE "balances"."grams" > 0;--> statement-breakpoint
CREATE TABLE `entries` (
	`id` integer PRIMARY KEY NOT NULL,
	`act_id` integer NOT NULL,
	`kind` text NOT NULL,
	`rule_version` integer NOT NULL,
	`occurred_at` integer NOT NULL,
	`booked_day` text NOT NULL,
	`concerns_day` text,
	`recorded_at` integer NOT NULL,
	`done_by` text NOT NULL,
	`sent_by` text NOT NULL,
	`device` text,
	`subject` text NOT NULL,
	`reverses` integer,
	`note_hash` text,
	`line_count` integer NOT NULL,
	`part_count` integer NOT NULL,
	`prev_hash` text NOT NULL,
	`hash` text NOT NULL,
	CONSTRAINT "entries_kind" CHECK("entries"."kind" in ('weigh-in', 'sort', 'step', 'identify', 'move', 'count', 'opening', 'draw', 'return', 'finish', 'cut', 'take-back', 'removal', 'receipt', 'import', 'reversal', 'settling')),
	CONSTRAINT "entries_reversal" CHECK(("entries"."kind" = 'reversal') = ("entries"."reverses" is not null)),
	CONSTRAINT "entries_day" CHECK(length("entries"."booked_day") = 10),
	CONSTRAINT "entries_whole_numbers" CHECK(typeof("entries"."id") in ('integer', 'null') and typeof("entries"."act_id") in ('integer', 'null') and typeof("entries"."rule_version") in ('integer', 'null') and typeof("entries"."occurred_at") in ('integer', 'null') and typeof("entries"."recorded_at") in ('integer', 'null') and typeof("entries"."reverses") in ('integer', 'null') and typeof("entries"."line_count") in ('integer', 'null') and typeof("entries"."part_count") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `entries_reverses_unique` ON `entries` (`reverses`);--> statement-breakpoint
CREATE INDEX `entries_booked_day` ON `entries` (`booked_day`,`id`);--> statement-breakpoint
CREATE INDEX `entries_concerns_day` ON `entries` (`concerns_day`) WHERE "entries"."concerns_day" is not null;--> statement-breakpoint
CREATE INDEX `entries_subject` ON `entries` (`subject`,`id`);--> statement-breakpoint
CREATE INDEX `entries_act` ON `entries` (`act_id`,`id`);--> statement-breakpoint
CREATE TABLE `holders` (
	`id` integer PRIMARY KEY NOT NULL,
	`kind` text NOT NULL,
	`code` text NOT NULL,
	CONSTRAINT "holders_kind" CHECK("holders"."kind" in ('bag', 'lot', 'run', 'reject-bin', 'batch'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `holders_code_unique` ON `holders` (`code`);--> statement-breakpoint
CREATE TABLE `line_parts` (
	`entry_id` integer NOT NULL,
	`seq` integer NOT NULL,
	`dim` text NOT NULL,
	`key` integer NOT NULL,
	`grams` integer NOT NULL,
	PRIMARY KEY(`entry_id`, `seq`, `dim`, `key`),
	CONSTRAINT "line_parts_dim" CHECK("line_parts"."dim" in ('O', 'H')),
	CONSTRAINT "line_parts_not_zero" CHECK("line_parts"."grams" <> 0),
	CONSTRAINT "line_parts_key" CHECK("line_parts"."key" >= 0 and ("line_parts"."dim" = 'O' or "line_parts"."key" <= 3)),
	CONSTRAINT "line_parts_whole_numbers" CHECK(typeof("line_parts"."entry_id") in ('integer', 'null') and typeof("line_parts"."seq") in ('integer', 'null') and typeof("line_parts"."key") in ('integer', 'null') and typeof("line_parts"."grams") in ('integer', 'null'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE TABLE `lines` (
	`entry_id` integer NOT NULL,
	`seq` integer NOT NULL,
	`account` text NOT NULL,
	`cause` text,
	`holder_id` integer,
	`material_id` integer NOT NULL,
	`grams` integer NOT NULL,
	`after` integer,
	`basis` text,
	`scale_id` integer,
	`mpe_mg` integer,
	PRIMARY KEY(`entry_id`, `seq`),
	FOREIGN KEY (`holder_id`) REFERENCES `holders`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`material_id`) REFERENCES `materials`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "lines_account" CHECK("lines"."account" in ('source', 'bag', 'lot', 'run', 'reject-bin', 'pieces', 'disposed', 'passed-on', 'loss', 'difference', 'opening', 'before-opening')),
	CONSTRAINT "lines_not_zero" CHECK("lines"."grams" <> 0),
	CONSTRAINT "lines_holder" CHECK(("lines"."account" in ('bag', 'lot', 'run', 'reject-bin', 'pieces')) = ("lines"."holder_id" is not null) and ("lines"."holder_id" is null) = ("lines"."after" is null)),
	CONSTRAINT "lines_whole_numbers" CHECK(typeof("lines"."entry_id") in ('integer', 'null') and typeof("lines"."seq") in ('integer', 'null') and typeof("lines"."holder_id") in ('integer', 'null') and typeof("lines"."material_id") in ('integer', 'null') and typeof("lines"."grams") in ('integer', 'null') and typeof("lines"."after") in ('integer', 'null') and typeof("lines"."scale_id") in ('integer', 'null') and typeof("lines"."mpe_mg") in ('integer', 'null'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE INDEX `lines_holder` ON `lines` (`holder_id`,`entry_id`) WHERE "lines"."holder_id" is not null;--> statement-breakpoint
CREATE TABLE `materials` (
	`id` integer PRIMARY KEY NOT NULL,
	`row_id` integer NOT NULL,
	`form` text,
	`wash` text,
	FOREIGN KEY (`row_id`) REFERENCES `rows`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `materials_content` ON `materials` (`row_id`,`form`,`wash`);--> statement-breakpoint
CREATE TABLE `origins` (
	`no` integer PRIMARY KEY NOT NULL,
	`type` text NOT NULL,
	`point_id` text,
	FOREIGN KEY (`point_id`) REFERENCES `points`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "origins_type" CHECK("origins"."type" in ('donated', 'collector', 'pre-consumer', 'bought', 'additive', 'unknown'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `origins_content` ON `origins` (`type`,`point_id`);--> statement-breakpoint
CREATE TABLE `parts` (
	`holder_id` integer NOT NULL,
	`material_id` integer NOT NULL,
	`dim` text NOT NULL,
	`key` integer NOT NULL,
	`grams` integer NOT NULL,
	PRIMARY KEY(`holder_id`, `material_id`, `dim`, `key`),
	FOREIGN KEY (`holder_id`) REFERENCES `holders`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`material_id`) REFERENCES `materials`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "parts_not_negative" CHECK("parts"."grams" > 0),
	CONSTRAINT "parts_whole_numbers" CHECK(typeof("parts"."holder_id") in ('integer', 'null') and typeof("parts"."material_id") in ('integer', 'null') and typeof("parts"."key") in ('integer', 'null') and typeof("parts"."grams") in ('integer', 'null'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE TABLE `periods` (
	`month` text PRIMARY KEY NOT NULL,
	`closed_entry` integer NOT NULL,
	`head_hash` text NOT NULL,
	`snapshot` text NOT NULL,
	`closed_by` text NOT NULL
);
--> statement-breakpoint
CREATE TABLE `rows` (
	`id` integer PRIMARY KEY NOT NULL,
	`polymer` text,
	`kind` text,
	`colour_code` text,
	CONSTRAINT "rows_complete" CHECK(("rows"."id" <= 2 and "rows"."polymer" is null and "rows"."kind" is null and "rows"."colour_code" is null) or ("rows"."id" > 2 and "rows"."polymer" is not null and "rows"."kind" is not null and "rows"."colour_code" is not null))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `rows_content` ON `rows` (`polymer`,`kind`,`colour_code`);--> statement-breakpoint
CREATE TABLE `totals_day` (
	`day` text NOT NULL,
	`row_id` integer NOT NULL,
	`origin_no` integer NOT NULL,
	`held` integer NOT NULL,
	`collected` integer NOT NULL,
	`other_in` integer NOT NULL,
	`opening` integer NOT NULL,
	`disposed` integer NOT NULL,
	`passed_proven` integer NOT NULL,
	`passed_unproven` integer NOT NULL,
	`loss` integer NOT NULL,
	`difference` integer NOT NULL,
	`pieces` integer NOT NULL,
	`accepted` integer NOT NULL,
	`rejected` integer NOT NULL,
	`bags` integer NOT NULL,
	`before_opening` integer NOT NULL,
	PRIMARY KEY(`day`, `row_id`, `origin_no`),
	FOREIGN KEY (`row_id`) REFERENCES `rows`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`origin_no`) REFERENCES `origins`(`no`) ON UPDATE no action ON DELETE no action
) WITHOUT ROWID;
--> statement-breakpoint
CREATE TABLE `totals_month` (
	`month` text NOT NULL,
	`row_id` integer NOT NULL,
	`origin_no` integer NOT NULL,
	`held` integer NOT NULL,
	`collected` integer NOT NULL,
	`other_in` integer NOT NULL,
	`opening` integer NOT NULL,
	`disposed` integer NOT NULL,
	`passed_proven` integer NOT NULL,
	`passed_unproven` integer NOT NULL,
	`loss` integer NOT NULL,
	`difference` integer NOT NULL,
	`pieces` integer NOT NULL,
	`accepted` integer NOT NULL,
	`rejected` integer NOT NULL,
	`bags` integer NOT NULL,
	`before_opening` integer NOT NULL,
	PRIMARY KEY(`month`, `row_id`, `origin_no`),
	FOREIGN KEY (`row_id`) REFERENCES `rows`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`origin_no`) REFERENCES `origins`(`no`) ON UPDATE no action ON DELETE no action
) WITHOUT ROWID;
--> statement-breakpoint
CREATE TABLE `totals_scale` (
	`month` text NOT NULL,
	`measure` text NOT NULL,
	`basis` text NOT NULL,
	`scale_id` integer NOT NULL,
	`grams` integer NOT NULL,
	`mpe_mg` integer NOT NULL,
	PRIMARY KEY(`month`, `measure`, `basis`, `scale_id`),
	CONSTRAINT "totals_scale_whole_numbers" CHECK(typeof("totals_scale"."scale_id") in ('integer', 'null') and typeof("totals_scale"."grams") in ('integer', 'null') and typeof("totals_scale"."mpe_mg") in ('integer', 'null'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE TABLE `outbox` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`to_address` text NOT NULL,
	`subject` text NOT NULL,
	`body` text NOT NULL,
	`created_at` integer NOT NULL,
	`sent_at` integer,
	`attempts` integer DEFAULT 0 NOT NULL,
	`next_attempt_at` integer NOT NULL,
	`last_error` text,
	CONSTRAINT "outbox_whole_numbers" CHECK(typeof("outbox"."created_at") in ('integer', 'null') and typeof("outbox"."sent_at") in ('integer', 'null') and typeof("outbox"."attempts") in ('integer', 'null') and typeof("outbox"."next_attempt_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE INDEX `outbox_waiting` ON `outbox` (`sent_at`,`next_attempt_at`);--> statement-breakpoint
CREATE TABLE `job_leases` (
	`name` text PRIMARY KEY NOT NULL,
	`holder` text NOT NULL,
	`until` integer NOT NULL,
	`last_finished_at` integer,
	`last_result` text,
	CONSTRAINT "job_leases_whole_numbers" CHECK(typeof("job_leases"."until") in ('integer', 'null') and typeof("job_leases"."last_finished_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE TABLE `receipts` (
	`request_id` text PRIMARY KEY NOT NULL,
	`sender` text NOT NULL,
	`endpoint` text NOT NULL,
	`body_hash` text NOT NULL,
	`answer` text NOT NULL,
	`at` integer NOT NULL,
	CONSTRAINT "receipts_whole_numbers" CHECK(typeof("receipts"."at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE TABLE `scheme` (
	`id` integer PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`time_zone` text NOT NULL,
	`first_day` text NOT NULL,
	`note_salt` text NOT NULL,
	`created_at` integer NOT NULL,
	CONSTRAINT "scheme_one_row" CHECK("scheme"."id" = 1),
	CONSTRAINT "scheme_whole_numbers" CHECK(typeof("scheme"."created_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE TABLE `sites` (
	`id` integer PRIMARY KEY NOT NULL,
	`name` text NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `sites_name_unique` ON `sites` (`name`);--> statement-breakpoint
CREATE TABLE `points` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`kind` text NOT NULL,
	`created_at` integer NOT NULL,
	`closed_at` integer,
	CONSTRAINT "points_kind" CHECK("points"."kind" in ('library', 'school', 'cafe', 'shop', 'community-hall', 'workplace', 'boatyard', 'sports-club', 'market', 'other', 'shed', 'not-known')),
	CONSTRAINT "points_whole_numbers" CHECK(typeof("points"."created_at") in ('integer', 'null') and typeof("points"."closed_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `points_name_unique` ON `points` (`name`);--> statement-breakpoint
CREATE TABLE `containers` (
	`id` text PRIMARY KEY NOT NULL,
	`kind` text NOT NULL,
	`name` text NOT NULL,
	`tare_mg` integer NOT NULL,
	`label_code` text,
	`created_at` integer NOT NULL,
	`retired_at` integer,
	CONSTRAINT "containers_kind" CHECK("containers"."kind" in ('container', 'sack')),
	CONSTRAINT "containers_tare" CHECK("containers"."tare_mg" >= 0),
	CONSTRAINT "containers_whole_numbers" CHECK(typeof("containers"."tare_mg") in ('integer', 'null') and typeof("containers"."created_at") in ('integer', 'null') and typeof("containers"."retired_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `containers_name_unique` ON `containers` (`name`);--> statement-breakpoint
CREATE UNIQUE INDEX `containers_label_code_unique` ON `containers` (`label_code`);--> statement-breakpoint
CREATE TABLE `scales` (
	`id` text PRIMARY KEY NOT NULL,
	`number` integer NOT NULL,
	`name` text NOT NULL,
	`site_id` integer NOT NULL,
	`class` text NOT NULL,
	`max_mg` integer NOT NULL,
	`e_mg` integer,
	`d_mg` integer NOT NULL,
	`stated_accuracy_mg` integer,
	`created_at` integer NOT NULL,
	`retired_at` integer,
	FOREIGN KEY (`site_id`) REFERENCES `sites`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "scales_class" CHECK("scales"."class" in ('III', 'IIII', 'none')),
	CONSTRAINT "scales_accuracy" CHECK(("scales"."class" = 'none') = ("scales"."stated_accuracy_mg" is not null) and ("scales"."class" = 'none') = ("scales"."e_mg" is null)),
	CONSTRAINT "scales_whole_numbers" CHECK(typeof("scales"."number") in ('integer', 'null') and typeof("scales"."max_mg") in ('integer', 'null') and typeof("scales"."e_mg") in ('integer', 'null') and typeof("scales"."d_mg") in ('integer', 'null') and typeof("scales"."stated_accuracy_mg") in ('integer', 'null') and typeof("scales"."created_at") in ('integer', 'null') and typeof("scales"."retired_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `scales_number_unique` ON `scales` (`number`);--> statement-breakpoint
CREATE UNIQUE INDEX `scales_name_unique` ON `scales` (`name`);--> statement-breakpoint
CREATE TABLE `fractions` (
	`session_id` text NOT NULL,
	`seq` integer NOT NULL,
	`lot_id` text,
	`material_id` integer NOT NULL,
	`reject_reason` text,
	`scale_id` text NOT NULL,
	`gross_mg` integer NOT NULL,
	`tare_mg` integer NOT NULL,
	`net_grams` integer NOT NULL,
	PRIMARY KEY(`session_id`, `seq`),
	FOREIGN KEY (`session_id`) REFERENCES `sorting_sessions`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`lot_id`) REFERENCES `lots`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`material_id`) REFERENCES `materials`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`reject_reason`) REFERENCES `reject_reasons`(`code`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`scale_id`) REFERENCES `scales`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "fractions_pile_or_reject" CHECK(("fractions"."lot_id" is null) = ("fractions"."reject_reason" is not null)),
	CONSTRAINT "fractions_net" CHECK("fractions"."net_grams" > 0),
	CONSTRAINT "fractions_whole_numbers" CHECK(typeof("fractions"."seq") in ('integer', 'null') and typeof("fractions"."gross_mg") in ('integer', 'null') and typeof("fractions"."tare_mg") in ('integer', 'null') and typeof("fractions"."net_grams") in ('integer', 'null'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE INDEX `fractions_lot` ON `fractions` (`lot_id`);--> statement-breakpoint
CREATE TABLE `reject_reasons` (
	`code` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`warning` integer NOT NULL,
	`position` integer NOT NULL,
	`retired_at` integer,
	CONSTRAINT "reject_reasons_whole_numbers" CHECK(typeof("reject_reasons"."position") in ('integer', 'null') and typeof("reject_reasons"."retired_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `reject_reasons_name_unique` ON `reject_reasons` (`name`);--> statement-breakpoint
CREATE TABLE `sorting_bags` (
	`session_id` text NOT NULL,
	`bag_id` text NOT NULL,
	`live` integer NOT NULL,
	PRIMARY KEY(`session_id`, `bag_id`),
	FOREIGN KEY (`session_id`) REFERENCES `sorting_sessions`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`bag_id`) REFERENCES `bags`(`id`) ON UPDATE no action ON DELETE no action
) WITHOUT ROWID;
--> statement-breakpoint
CREATE UNIQUE INDEX `sorting_bags_one_live` ON `sorting_bags` (`bag_id`) WHERE "sorting_bags"."live" = 1;--> statement-breakpoint
CREATE TABLE `sorting_sessions` (
	`id` text PRIMARY KEY NOT NULL,
	`state` text NOT NULL,
	`done_by` text NOT NULL,
	`occurred_at` integer NOT NULL,
	`recorded_at` integer NOT NULL,
	`net_grams` integer NOT NULL,
	`difference_grams` integer NOT NULL,
	`tolerance_mg` integer NOT NULL,
	`cause` text,
	`act_id` integer NOT NULL,
	`undone_act_id` integer,
	FOREIGN KEY (`done_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "sorting_sessions_state" CHECK("sorting_sessions"."state" in ('closed', 'undone')),
	CONSTRAINT "sorting_sessions_whole_numbers" CHECK(typeof("sorting_sessions"."net_grams") in ('integer', 'null') and typeof("sorting_sessions"."difference_grams") in ('integer', 'null') and typeof("sorting_sessions"."tolerance_mg") in ('integer', 'null') and typeof("sorting_sessions"."occurred_at") in ('integer', 'null') and typeof("sorting_sessions"."recorded_at") in ('integer', 'null') and typeof("sorting_sessions"."act_id") in ('integer', 'null') and typeof("sorting_sessions"."undone_act_id") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE INDEX `sorting_sessions_recorded` ON `sorting_sessions` (`recorded_at`);--> statement-breakpoint
CREATE TABLE `colours` (
	`code` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`hex` text NOT NULL,
	`look` text NOT NULL,
	`position` integer NOT NULL,
	`retired_at` integer,
	CONSTRAINT "colours_look" CHECK("colours"."look" in ('solid', 'clear', 'mixed')),
	CONSTRAINT "colours_whole_numbers" CHECK(typeof("colours"."position") in ('integer', 'null') and typeof("colours"."retired_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `colours_name_unique` ON `colours` (`name`);--> statement-breakpoint
CREATE TABLE `lots` (
	`id` text PRIMARY KEY NOT NULL,
	`number` integer NOT NULL,
	`holder_id` integer NOT NULL,
	`material_id` integer NOT NULL,
	`site_id` integer NOT NULL,
	`place` text DEFAULT '' NOT NULL,
	`opened_at` integer NOT NULL,
	`closed_at` integer,
	FOREIGN KEY (`holder_id`) REFERENCES `holders`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`material_id`) REFERENCES `materials`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`site_id`) REFERENCES `sites`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "lots_whole_numbers" CHECK(typeof("lots"."number") in ('integer', 'null') and typeof("lots"."opened_at") in ('integer', 'null') and typeof("lots"."closed_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `lots_number_unique` ON `lots` (`number`);--> statement-breakpoint
CREATE UNIQUE INDEX `lots_holder_id_unique` ON `lots` (`holder_id`);--> statement-breakpoint
CREATE INDEX `lots_material` ON `lots` (`material_id`,`closed_at`);--> statement-breakpoint
CREATE TABLE `weigh_in_readings` (
	`weigh_in_id` text NOT NULL,
	`seq` integer NOT NULL,
	`gross_mg` integer NOT NULL,
	`container_id` text,
	`container_tare_mg` integer NOT NULL,
	`sack_id` text,
	`sack_tare_mg` integer NOT NULL,
	PRIMARY KEY(`weigh_in_id`, `seq`),
	FOREIGN KEY (`weigh_in_id`) REFERENCES `weigh_ins`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`container_id`) REFERENCES `containers`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`sack_id`) REFERENCES `containers`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "weigh_in_readings_whole_numbers" CHECK(typeof("weigh_in_readings"."seq") in ('integer', 'null') and typeof("weigh_in_readings"."gross_mg") in ('integer', 'null') and typeof("weigh_in_readings"."container_tare_mg") in ('integer', 'null') and typeof("weigh_in_readings"."sack_tare_mg") in ('integer', 'null'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE TABLE `weigh_ins` (
	`id` text PRIMARY KEY NOT NULL,
	`bag_id` text NOT NULL,
	`point_id` text NOT NULL,
	`scale_id` text NOT NULL,
	`done_by` text NOT NULL,
	`occurred_at` integer NOT NULL,
	`recorded_at` integer NOT NULL,
	`state` text NOT NULL,
	`net_grams` integer NOT NULL,
	`mpe_mg` integer NOT NULL,
	`basis` text NOT NULL,
	`below_minimum` integer NOT NULL,
	`condition` text NOT NULL,
	`polymer` text NOT NULL,
	`kind` text,
	`colour_code` text,
	`one_kind` integer NOT NULL,
	`lot_id` text,
	`act_id` integer,
	`undone_act_id` integer,
	FOREIGN KEY (`bag_id`) REFERENCES `bags`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`point_id`) REFERENCES `points`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`scale_id`) REFERENCES `scales`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`done_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "weigh_ins_state" CHECK("weigh_ins"."state" in ('posted', 'for-review', 'undone', 'discarded')),
	CONSTRAINT "weigh_ins_condition" CHECK("weigh_ins"."condition" in ('clean', 'dirty', 'wet')),
	CONSTRAINT "weigh_ins_net" CHECK("weigh_ins"."net_grams" > 0),
	CONSTRAINT "weigh_ins_act" CHECK(("weigh_ins"."state" in ('posted', 'undone')) = ("weigh_ins"."act_id" is not null)),
	CONSTRAINT "weigh_ins_whole_numbers" CHECK(typeof("weigh_ins"."net_grams") in ('integer', 'null') and typeof("weigh_ins"."mpe_mg") in ('integer', 'null') and typeof("weigh_ins"."occurred_at") in ('integer', 'null') and typeof("weigh_ins"."recorded_at") in ('integer', 'null') and typeof("weigh_ins"."act_id") in ('integer', 'null') and typeof("weigh_ins"."undone_act_id") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `weigh_ins_one_per_bag` ON `weigh_ins` (`bag_id`) WHERE "weigh_ins"."state" = 'posted';--> statement-breakpoint
CREATE INDEX `weigh_ins_recorded` ON `weigh_ins` (`recorded_at`);--> statement-breakpoint
CREATE INDEX `weigh_ins_bag` ON `weigh_ins` (`bag_id`);--> statement-breakpoint
CREATE INDEX `weigh_ins_point` ON `weigh_ins` (`point_id`,`recorded_at`);--> statement-breakpoint
CREATE INDEX `weigh_ins_review` ON `weigh_ins` (`recorded_at`) WHERE "weigh_ins"."state" = 'for-review';--> statement-breakpoint
INSERT INTO `sites` (`id`, `name`) VALUES (1, 'Shed');--> statement-breakpoint
INSERT INTO `rows` (`id`) VALUES (1), (2);--> statement-breakpoint
INSERT INTO `materials` (`id`, `row_id`) VALUES (1, 1), (2, 2);--> statement-breakpoint
INSERT INTO `origins` (`no`, `type`) VALUES (0, 'unknown');
