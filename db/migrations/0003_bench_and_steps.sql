CREATE TABLE `corrections` (
	`id` text PRIMARY KEY NOT NULL,
	`subject_kind` text NOT NULL,
	`subject_id` text NOT NULL,
	`replacement_id` text,
	`reason` text,
	`done_by` text NOT NULL,
	`at` integer NOT NULL,
	`act_id` integer NOT NULL,
	CONSTRAINT "corrections_whole_numbers" CHECK(typeof("corrections"."at") in ('integer', 'null') and typeof("corrections"."act_id") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE INDEX `corrections_subject` ON `corrections` (`subject_kind`,`subject_id`);--> statement-breakpoint
CREATE INDEX `corrections_act` ON `corrections` (`act_id`);--> statement-breakpoint
CREATE TABLE `scheme_limits` (
	`id` integer PRIMARY KEY NOT NULL,
	`lot_weeks` integer,
	`storage_grams` integer,
	`storage_days` integer,
	CONSTRAINT "scheme_limits_one_row" CHECK("scheme_limits"."id" = 1),
	CONSTRAINT "scheme_limits_whole_numbers" CHECK(typeof("scheme_limits"."lot_weeks") in ('integer', 'null') and typeof("scheme_limits"."storage_grams") in ('integer', 'null') and typeof("scheme_limits"."storage_days") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE TABLE `destinations` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`route` text NOT NULL,
	`receiver_number` text NOT NULL,
	`carrier_name` text NOT NULL,
	`carrier_number` text NOT NULL,
	`permit_until` text,
	`waste_code` text NOT NULL,
	`created_at` integer NOT NULL,
	`retired_at` integer,
	CONSTRAINT "destinations_route" CHECK("destinations"."route" in ('disposed', 'passed-on')),
	CONSTRAINT "destinations_whole_numbers" CHECK(typeof("destinations"."created_at") in ('integer', 'null') and typeof("destinations"."retired_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `destinations_name_unique` ON `destinations` (`name`);--> statement-breakpoint
CREATE TABLE `removal_lots` (
	`removal_id` text NOT NULL,
	`lot_id` text NOT NULL,
	`grams` integer NOT NULL,
	PRIMARY KEY(`removal_id`, `lot_id`),
	FOREIGN KEY (`removal_id`) REFERENCES `removals`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`lot_id`) REFERENCES `lots`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "removal_lots_grams" CHECK("removal_lots"."grams" > 0),
	CONSTRAINT "removal_lots_whole_numbers" CHECK(typeof("removal_lots"."grams") in ('integer', 'null'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE INDEX `removal_lots_lot` ON `removal_lots` (`lot_id`);--> statement-breakpoint
CREATE TABLE `removal_receipts` (
	`id` text PRIMARY KEY NOT NULL,
	`removal_id` text NOT NULL,
	`number` text NOT NULL,
	`received_grams` integer NOT NULL,
	`done_by` text NOT NULL,
	`occurred_at` integer NOT NULL,
	`recorded_at` integer NOT NULL,
	`state` text NOT NULL,
	`act_id` integer NOT NULL,
	`undone_act_id` integer,
	FOREIGN KEY (`removal_id`) REFERENCES `removals`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`done_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "removal_receipts_state" CHECK("removal_receipts"."state" in ('posted', 'undone', 'corrected')),
	CONSTRAINT "removal_receipts_grams" CHECK("removal_receipts"."received_grams" > 0),
	CONSTRAINT "removal_receipts_whole_numbers" CHECK(typeof("removal_receipts"."received_grams") in ('integer', 'null') and typeof("removal_receipts"."occurred_at") in ('integer', 'null') and typeof("removal_receipts"."recorded_at") in ('integer', 'null') and typeof("removal_receipts"."act_id") in ('integer', 'null') and typeof("removal_receipts"."undone_act_id") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `removal_receipts_one_live` ON `removal_receipts` (`removal_id`) WHERE "removal_receipts"."state" = 'posted';--> statement-breakpoint
CREATE TABLE `removals` (
	`id` text PRIMARY KEY NOT NULL,
	`source` text NOT NULL,
	`route` text NOT NULL,
	`destination_id` text NOT NULL,
	`receiver_name` text NOT NULL,
	`receiver_number` text NOT NULL,
	`carrier_name` text NOT NULL,
	`carrier_number` text NOT NULL,
	`waste_code` text NOT NULL,
	`note_number` text NOT NULL,
	`grams` integer NOT NULL,
	`difference_grams` integer NOT NULL,
	`basis` text NOT NULL,
	`scale_id` text,
	`gross_mg` integer,
	`tare_mg` integer,
	`done_by` text NOT NULL,
	`occurred_at` integer NOT NULL,
	`recorded_at` integer NOT NULL,
	`state` text NOT NULL,
	`corrects` text,
	`act_id` integer NOT NULL,
	`undone_act_id` integer,
	FOREIGN KEY (`destination_id`) REFERENCES `destinations`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`scale_id`) REFERENCES `scales`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`done_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "removals_source" CHECK("removals"."source" in ('reject-bin', 'stock')),
	CONSTRAINT "removals_route" CHECK("removals"."route" in ('disposed', 'passed-on')),
	CONSTRAINT "removals_state" CHECK("removals"."state" in ('posted', 'undone', 'corrected')),
	CONSTRAINT "removals_basis" CHECK("removals"."basis" in ('checked', 'unchecked', 'estimated', 'imported', 'stated')),
	CONSTRAINT "removals_grams" CHECK("removals"."grams" > 0),
	CONSTRAINT "removals_whole_numbers" CHECK(typeof("removals"."grams") in ('integer', 'null') and typeof("removals"."difference_grams") in ('integer', 'null') and typeof("removals"."gross_mg") in ('integer', 'null') and typeof("removals"."tare_mg") in ('integer', 'null') and typeof("removals"."occurred_at") in ('integer', 'null') and typeof("removals"."recorded_at") in ('integer', 'null') and typeof("removals"."act_id") in ('integer', 'null') and typeof("removals"."undone_act_id") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE INDEX `removals_recorded` ON `removals` (`recorded_at`);--> statement-breakpoint
CREATE TABLE `check_weights` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`mass_mg` integer NOT NULL,
	`evidence` text NOT NULL,
	`created_at` integer NOT NULL,
	`retired_at` integer,
	CONSTRAINT "check_weights_mass" CHECK("check_weights"."mass_mg" > 0),
	CONSTRAINT "check_weights_whole_numbers" CHECK(typeof("check_weights"."mass_mg") in ('integer', 'null') and typeof("check_weights"."created_at") in ('integer', 'null') and typeof("check_weights"."retired_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `check_weights_name_unique` ON `check_weights` (`name`);--> statement-breakpoint
CREATE TABLE `container_tares` (
	`container_id` text NOT NULL,
	`valid_from` integer NOT NULL,
	`tare_mg` integer NOT NULL,
	`set_by` text,
	PRIMARY KEY(`container_id`, `valid_from`),
	FOREIGN KEY (`container_id`) REFERENCES `containers`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`set_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "container_tares_tare" CHECK("container_tares"."tare_mg" >= 0),
	CONSTRAINT "container_tares_whole_numbers" CHECK(typeof("container_tares"."valid_from") in ('integer', 'null') and typeof("container_tares"."tare_mg") in ('integer', 'null'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE TABLE `scale_checks` (
	`id` text PRIMARY KEY NOT NULL,
	`scale_id` text NOT NULL,
	`check_weight_id` text NOT NULL,
	`day` text NOT NULL,
	`attempt` integer NOT NULL,
	`mass_mg` integer NOT NULL,
	`reading_mg` integer NOT NULL,
	`limit_mg` integer NOT NULL,
	`passed` integer NOT NULL,
	`done_by` text NOT NULL,
	`occurred_at` integer NOT NULL,
	`recorded_at` integer NOT NULL,
	FOREIGN KEY (`scale_id`) REFERENCES `scales`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`check_weight_id`) REFERENCES `check_weights`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`done_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "scale_checks_attempt" CHECK("scale_checks"."attempt" > 0),
	CONSTRAINT "scale_checks_whole_numbers" CHECK(typeof("scale_checks"."attempt") in ('integer', 'null') and typeof("scale_checks"."mass_mg") in ('integer', 'null') and typeof("scale_checks"."reading_mg") in ('integer', 'null') and typeof("scale_checks"."limit_mg") in ('integer', 'null') and typeof("scale_checks"."occurred_at") in ('integer', 'null') and typeof("scale_checks"."recorded_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE INDEX `scale_checks_scale_day` ON `scale_checks` (`scale_id`,`day`,`recorded_at`);--> statement-breakpoint
CREATE TABLE `scale_clearances` (
	`scale_id` text NOT NULL,
	`day` text NOT NULL,
	`note` text NOT NULL,
	`cleared_by` text NOT NULL,
	`cleared_at` integer NOT NULL,
	PRIMARY KEY(`scale_id`, `day`),
	FOREIGN KEY (`scale_id`) REFERENCES `scales`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`cleared_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "scale_clearances_whole_numbers" CHECK(typeof("scale_clearances"."cleared_at") in ('integer', 'null'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE TABLE `sorting_draft_bags` (
	`draft_id` text NOT NULL,
	`bag_id` text NOT NULL,
	`live` integer NOT NULL,
	PRIMARY KEY(`draft_id`, `bag_id`),
	FOREIGN KEY (`draft_id`) REFERENCES `sorting_drafts`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`bag_id`) REFERENCES `bags`(`id`) ON UPDATE no action ON DELETE no action
) WITHOUT ROWID;
--> statement-breakpoint
CREATE UNIQUE INDEX `sorting_draft_bags_one_live` ON `sorting_draft_bags` (`bag_id`) WHERE "sorting_draft_bags"."live" = 1;--> statement-breakpoint
CREATE TABLE `sorting_drafts` (
	`id` text PRIMARY KEY NOT NULL,
	`state` text NOT NULL,
	`started_by` text NOT NULL,
	`started_at` integer NOT NULL,
	`changed_by` text NOT NULL,
	`changed_at` integer NOT NULL,
	`version` integer NOT NULL,
	`content` text NOT NULL,
	FOREIGN KEY (`started_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`changed_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "sorting_drafts_state" CHECK("sorting_drafts"."state" in ('open', 'saved', 'given-up')),
	CONSTRAINT "sorting_drafts_whole_numbers" CHECK(typeof("sorting_drafts"."started_at") in ('integer', 'null') and typeof("sorting_drafts"."changed_at") in ('integer', 'null') and typeof("sorting_drafts"."version") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE INDEX `sorting_drafts_open` ON `sorting_drafts` (`changed_at`) WHERE "sorting_drafts"."state" = 'open';--> statement-breakpoint
CREATE TABLE `sorting_presence` (
	`draft_id` text NOT NULL,
	`person_id` text NOT NULL,
	`seen_at` integer NOT NULL,
	PRIMARY KEY(`draft_id`, `person_id`),
	FOREIGN KEY (`draft_id`) REFERENCES `sorting_drafts`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "sorting_presence_whole_numbers" CHECK(typeof("sorting_presence"."seen_at") in ('integer', 'null'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE TABLE `counts` (
	`id` text PRIMARY KEY NOT NULL,
	`kind` text NOT NULL,
	`lot_id` text NOT NULL,
	`book_grams` integer NOT NULL,
	`counted_grams` integer NOT NULL,
	`basis` text NOT NULL,
	`scale_id` text,
	`gross_mg` integer,
	`tare_mg` integer,
	`mpe_mg` integer NOT NULL,
	`sheet` text,
	`act_id` integer,
	`corrects` text,
	`reviewed_by` text,
	`reviewed_at` integer,
	`done_by` text NOT NULL,
	`occurred_at` integer NOT NULL,
	`recorded_at` integer NOT NULL,
	`state` text NOT NULL,
	`undone_act_id` integer,
	FOREIGN KEY (`lot_id`) REFERENCES `lots`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`scale_id`) REFERENCES `scales`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`reviewed_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`done_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "counts_kind" CHECK("counts"."kind" in ('count', 'empty', 'on-the-spot', 'opening')),
	CONSTRAINT "counts_state" CHECK("counts"."state" in ('posted', 'undone', 'corrected')),
	CONSTRAINT "counts_basis" CHECK("counts"."basis" in ('checked', 'unchecked', 'estimated', 'imported', 'stated')),
	CONSTRAINT "counts_grams" CHECK("counts"."book_grams" >= 0 and "counts"."counted_grams" >= 0),
	CONSTRAINT "counts_opening" CHECK(("counts"."kind" = 'opening') = ("counts"."sheet" is not null)),
	CONSTRAINT "counts_whole_numbers" CHECK(typeof("counts"."book_grams") in ('integer', 'null') and typeof("counts"."counted_grams") in ('integer', 'null') and typeof("counts"."gross_mg") in ('integer', 'null') and typeof("counts"."tare_mg") in ('integer', 'null') and typeof("counts"."mpe_mg") in ('integer', 'null') and typeof("counts"."act_id") in ('integer', 'null') and typeof("counts"."reviewed_at") in ('integer', 'null') and typeof("counts"."occurred_at") in ('integer', 'null') and typeof("counts"."recorded_at") in ('integer', 'null') and typeof("counts"."undone_act_id") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE INDEX `counts_lot` ON `counts` (`lot_id`,`recorded_at`);--> statement-breakpoint
CREATE INDEX `counts_to_review` ON `counts` (`recorded_at`) WHERE "counts"."reviewed_at" is null and "counts"."state" = 'posted';--> statement-breakpoint
CREATE TABLE `lot_moves` (
	`id` text PRIMARY KEY NOT NULL,
	`kind` text NOT NULL,
	`from_lot_id` text NOT NULL,
	`to_lot_id` text NOT NULL,
	`grams` integer NOT NULL,
	`method` text,
	`scale_id` text,
	`act_id` integer NOT NULL,
	`corrects` text,
	`done_by` text NOT NULL,
	`occurred_at` integer NOT NULL,
	`recorded_at` integer NOT NULL,
	`state` text NOT NULL,
	`undone_act_id` integer,
	FOREIGN KEY (`from_lot_id`) REFERENCES `lots`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`to_lot_id`) REFERENCES `lots`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`scale_id`) REFERENCES `scales`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`done_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "lot_moves_kind" CHECK("lot_moves"."kind" in ('merge', 'split', 'identify')),
	CONSTRAINT "lot_moves_state" CHECK("lot_moves"."state" in ('posted', 'undone', 'corrected')),
	CONSTRAINT "lot_moves_grams" CHECK("lot_moves"."grams" > 0),
	CONSTRAINT "lot_moves_method" CHECK(("lot_moves"."kind" = 'identify') = ("lot_moves"."method" is not null)),
	CONSTRAINT "lot_moves_two_lots" CHECK("lot_moves"."from_lot_id" <> "lot_moves"."to_lot_id"),
	CONSTRAINT "lot_moves_whole_numbers" CHECK(typeof("lot_moves"."grams") in ('integer', 'null') and typeof("lot_moves"."act_id") in ('integer', 'null') and typeof("lot_moves"."occurred_at") in ('integer', 'null') and typeof("lot_moves"."recorded_at") in ('integer', 'null') and typeof("lot_moves"."undone_act_id") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE INDEX `lot_moves_from` ON `lot_moves` (`from_lot_id`);--> statement-breakpoint
CREATE INDEX `lot_moves_to` ON `lot_moves` (`to_lot_id`);--> statement-breakpoint
CREATE TABLE `step_inputs` (
	`step_id` text NOT NULL,
	`lot_id` text NOT NULL,
	`grams` integer NOT NULL,
	`taking` text NOT NULL,
	`scale_id` text,
	`gross_mg` integer,
	`less_mg` integer,
	PRIMARY KEY(`step_id`, `lot_id`),
	FOREIGN KEY (`step_id`) REFERENCES `steps`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`lot_id`) REFERENCES `lots`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`scale_id`) REFERENCES `scales`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "step_inputs_taking" CHECK("step_inputs"."taking" in ('taken', 'weighed-back')),
	CONSTRAINT "step_inputs_grams" CHECK("step_inputs"."grams" > 0),
	CONSTRAINT "step_inputs_whole_numbers" CHECK(typeof("step_inputs"."grams") in ('integer', 'null') and typeof("step_inputs"."gross_mg") in ('integer', 'null') and typeof("step_inputs"."less_mg") in ('integer', 'null'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE INDEX `step_inputs_lot` ON `step_inputs` (`lot_id`);--> statement-breakpoint
CREATE TABLE `step_losses` (
	`step_id` text NOT NULL,
	`cause` text NOT NULL,
	`grams` integer NOT NULL,
	PRIMARY KEY(`step_id`, `cause`),
	FOREIGN KEY (`step_id`) REFERENCES `steps`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "step_losses_cause" CHECK("step_losses"."cause" in ('liquid', 'dirt', 'metal', 'moisture', 'dust', 'cuttings', 'spilled')),
	CONSTRAINT "step_losses_grams" CHECK("step_losses"."grams" > 0),
	CONSTRAINT "step_losses_whole_numbers" CHECK(typeof("step_losses"."grams") in ('integer', 'null'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE TABLE `step_outputs` (
	`step_id` text NOT NULL,
	`seq` integer NOT NULL,
	`lot_id` text NOT NULL,
	`grams` integer NOT NULL,
	`scale_id` text NOT NULL,
	`gross_mg` integer NOT NULL,
	`tare_mg` integer NOT NULL,
	PRIMARY KEY(`step_id`, `seq`),
	FOREIGN KEY (`step_id`) REFERENCES `steps`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`lot_id`) REFERENCES `lots`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`scale_id`) REFERENCES `scales`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "step_outputs_grams" CHECK("step_outputs"."grams" > 0),
	CONSTRAINT "step_outputs_whole_numbers" CHECK(typeof("step_outputs"."seq") in ('integer', 'null') and typeof("step_outputs"."grams") in ('integer', 'null') and typeof("step_outputs"."gross_mg") in ('integer', 'null') and typeof("step_outputs"."tare_mg") in ('integer', 'null'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE INDEX `step_outputs_lot` ON `step_outputs` (`lot_id`);--> statement-breakpoint
CREATE TABLE `steps` (
	`id` text PRIMARY KEY NOT NULL,
	`kind` text NOT NULL,
	`minutes` integer,
	`input_grams` integer NOT NULL,
	`output_grams` integer NOT NULL,
	`loss_grams` integer NOT NULL,
	`tolerance_mg` integer NOT NULL,
	`act_id` integer NOT NULL,
	`corrects` text,
	`done_by` text NOT NULL,
	`occurred_at` integer NOT NULL,
	`recorded_at` integer NOT NULL,
	`state` text NOT NULL,
	`undone_act_id` integer,
	FOREIGN KEY (`done_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "steps_kind" CHECK("steps"."kind" in ('washing', 'drying', 'shredding')),
	CONSTRAINT "steps_state" CHECK("steps"."state" in ('posted', 'undone', 'corrected')),
	CONSTRAINT "steps_grams" CHECK("steps"."input_grams" > 0 and "steps"."output_grams" >= 0 and "steps"."loss_grams" >= 0),
	CONSTRAINT "steps_whole_numbers" CHECK(typeof("steps"."minutes") in ('integer', 'null') and typeof("steps"."input_grams") in ('integer', 'null') and typeof("steps"."output_grams") in ('integer', 'null') and typeof("steps"."loss_grams") in ('integer', 'null') and typeof("steps"."tolerance_mg") in ('integer', 'null') and typeof("steps"."act_id") in ('integer', 'null') and typeof("steps"."occurred_at") in ('integer', 'null') and typeof("steps"."recorded_at") in ('integer', 'null') and typeof("steps"."undone_act_id") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE INDEX `steps_kind_recorded` ON `steps` (`kind`,`recorded_at`) WHERE "steps"."state" = 'posted';--> statement-breakpoint
CREATE TABLE `__new_sorting_sessions` (
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
	`corrects` text,
	FOREIGN KEY (`done_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "sorting_sessions_state" CHECK("__new_sorting_sessions"."state" in ('closed', 'undone', 'corrected')),
	CONSTRAINT "sorting_sessions_whole_numbers" CHECK(typeof("__new_sorting_sessions"."net_grams") in ('integer', 'null') and typeof("__new_sorting_sessions"."difference_grams") in ('integer', 'null') and typeof("__new_sorting_sessions"."tolerance_mg") in ('integer', 'null') and typeof("__new_sorting_sessions"."occurred_at") in ('integer', 'null') and typeof("__new_sorting_sessions"."recorded_at") in ('integer', 'null') and typeof("__new_sorting_sessions"."act_id") in ('integer', 'null') and typeof("__new_sorting_sessions"."undone_act_id") in ('integer', 'null'))
);
--> statement-breakpoint
INSERT INTO `__new_sorting_sessions`("id", "state", "done_by", "occurred_at", "recorded_at", "net_grams", "difference_grams", "tolerance_mg", "cause", "act_id", "undone_act_id", "corrects") SELECT "id", "state", "done_by", "occurred_at", "recorded_at", "net_grams", "difference_grams", "tolerance_mg", "cause", "act_id", "undone_act_id", NULL FROM `sorting_sessions`;--> statement-breakpoint
DROP TABLE `sorting_sessions`;--> statement-breakpoint
ALTER TABLE `__new_sorting_sessions` RENAME TO `sorting_sessions`;--> statement-breakpoint
CREATE INDEX `sorting_sessions_recorded` ON `sorting_sessions` (`recorded_at`);--> statement-breakpoint
CREATE TABLE `__new_weigh_ins` (
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
	`corrects` text,
	`reviewed_by` text,
	`reviewed_at` integer,
	FOREIGN KEY (`bag_id`) REFERENCES `bags`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`point_id`) REFERENCES `points`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`scale_id`) REFERENCES `scales`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`done_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`reviewed_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "weigh_ins_state" CHECK("__new_weigh_ins"."state" in ('posted', 'for-review', 'undone', 'discarded', 'corrected')),
	CONSTRAINT "weigh_ins_condition" CHECK("__new_weigh_ins"."condition" in ('clean', 'dirty', 'wet')),
	CONSTRAINT "weigh_ins_net" CHECK("__new_weigh_ins"."net_grams" > 0),
	CONSTRAINT "weigh_ins_act" CHECK(("__new_weigh_ins"."state" in ('posted', 'undone', 'corrected')) = ("__new_weigh_ins"."act_id" is not null)),
	CONSTRAINT "weigh_ins_whole_numbers" CHECK(typeof("__new_weigh_ins"."net_grams") in ('integer', 'null') and typeof("__new_weigh_ins"."mpe_mg") in ('integer', 'null') and typeof("__new_weigh_ins"."occurred_at") in ('integer', 'null') and typeof("__new_weigh_ins"."recorded_at") in ('integer', 'null') and typeof("__new_weigh_ins"."act_id") in ('integer', 'null') and typeof("__new_weigh_ins"."undone_act_id") in ('integer', 'null') and typeof("__new_weigh_ins"."reviewed_at") in ('integer', 'null'))
);
--> statement-breakpoint
INSERT INTO `__new_weigh_ins`("id", "bag_id", "point_id", "scale_id", "done_by", "occurred_at", "recorded_at", "state", "net_grams", "mpe_mg", "basis", "below_minimum", "condition", "polymer", "kind", "colour_code", "one_kind", "lot_id", "act_id", "undone_act_id", "corrects", "reviewed_by", "reviewed_at") SELECT "id", "bag_id", "point_id", "scale_id", "done_by", "occurred_at", "recorded_at", "state", "net_grams", "mpe_mg", "basis", "below_minimum", "condition", "polymer", "kind", "colour_code", "one_kind", "lot_id", "act_id", "undone_act_id", NULL, NULL, NULL FROM `weigh_ins`;--> statement-breakpoint
DROP TABLE `weigh_ins`;--> statement-breakpoint
ALTER TABLE `__new_weigh_ins` RENAME TO `weigh_ins`;--> statement-breakpoint
CREATE UNIQUE INDEX `weigh_ins_one_per_bag` ON `weigh_ins` (`bag_id`) WHERE "weigh_ins"."state" = 'posted';--> statement-breakpoint
CREATE INDEX `weigh_ins_recorded` ON `weigh_ins` (`recorded_at`);--> statement-breakpoint
CREATE INDEX `weigh_ins_bag` ON `weigh_ins` (`bag_id`);--> statement-breakpoint
CREATE INDEX `weigh_ins_point` ON `weigh_ins` (`point_id`,`recorded_at`);--> statement-breakpoint
CREATE INDEX `weigh_ins_review` ON `weigh_ins` (`recorded_at`) WHERE "weigh_ins"."state" = 'for-review';--> statement-breakpoint
CREATE TABLE `__new_lots` (
	`id` text PRIMARY KEY NOT NULL,
	`number` integer NOT NULL,
	`holder_id` integer NOT NULL,
	`material_id` integer NOT NULL,
	`site_id` integer NOT NULL,
	`place` text DEFAULT '' NOT NULL,
	`opened_at` integer NOT NULL,
	`closed_at` integer,
	`closed_for` text,
	`container_id` text,
	FOREIGN KEY (`holder_id`) REFERENCES `holders`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`material_id`) REFERENCES `materials`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`site_id`) REFERENCES `sites`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`container_id`) REFERENCES `containers`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "lots_whole_numbers" CHECK(typeof("__new_lots"."number") in ('integer', 'null') and typeof("__new_lots"."opened_at") in ('integer', 'null') and typeof("__new_lots"."closed_at") in ('integer', 'null')),
	CONSTRAINT "lots_closed_for" CHECK("__new_lots"."closed_for" is null or ("__new_lots"."closed_at" is not null and "__new_lots"."closed_for" in ('full', 'empty', 'step', 'age', 'merged', 'by-hand')))
);
--> statement-breakpoint
INSERT INTO `__new_lots`("id", "number", "holder_id", "material_id", "site_id", "place", "opened_at", "closed_at", "closed_for", "container_id") SELECT "id", "number", "holder_id", "material_id", "site_id", "place", "opened_at", "closed_at", NULL, NULL FROM `lots`;--> statement-breakpoint
DROP TABLE `lots`;--> statement-breakpoint
ALTER TABLE `__new_lots` RENAME TO `lots`;--> statement-breakpoint
CREATE UNIQUE INDEX `lots_number_unique` ON `lots` (`number`);--> statement-breakpoint
CREATE UNIQUE INDEX `lots_holder_id_unique` ON `lots` (`holder_id`);--> statement-breakpoint
CREATE INDEX `lots_material` ON `lots` (`material_id`,`closed_at`);--> statement-breakpoint
CREATE INDEX `lots_open_since` ON `lots` (`opened_at`) WHERE "lots"."closed_at" is null;--> statement-breakpoint
INSERT INTO `container_tares` (`container_id`, `valid_from`, `tare_mg`, `set_by`) SELECT `id`, `created_at`, `tare_mg`, NULL FROM `containers`;--> statement-breakpoint
INSERT INTO `scheme_limits` (`id`, `lot_weeks`, `storage_grams`, `storage_days`) VALUES (1, NULL, NULL, NULL);
