CREATE TABLE `densities` (
	`polymer` text PRIMARY KEY NOT NULL,
	`mg_per_cm3` integer NOT NULL,
	`source` text NOT NULL,
	`changed_at` integer NOT NULL,
	CONSTRAINT "densities_polymer" CHECK("densities"."polymer" in ('PET', 'PE-HD', 'PVC', 'PE-LD', 'PP', 'PS', 'ABS', 'PLA', 'PA', 'PC', 'O')),
	CONSTRAINT "densities_whole_numbers" CHECK(typeof("densities"."mg_per_cm3") in ('integer', 'null') and typeof("densities"."changed_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE TABLE `machines` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`method` text NOT NULL,
	`plate_length_um` integer,
	`plate_width_um` integer,
	`barrel_mm3` integer,
	`usable_thousandths` integer,
	`least_shot_mg` integer,
	`purge_mg` integer,
	`melt_s` integer NOT NULL,
	`cycle_s` integer NOT NULL,
	`rated_watts` integer,
	`created_at` integer NOT NULL,
	`retired_at` integer,
	CONSTRAINT "machines_method" CHECK("machines"."method" in ('pressing', 'moulding', 'cutting')),
	CONSTRAINT "machines_press" CHECK(("machines"."method" = 'pressing') = ("machines"."plate_length_um" is not null)),
	CONSTRAINT "machines_moulding" CHECK(("machines"."method" = 'moulding') = ("machines"."barrel_mm3" is not null)),
	CONSTRAINT "machines_whole_numbers" CHECK(typeof("machines"."plate_length_um") in ('integer', 'null') and typeof("machines"."plate_width_um") in ('integer', 'null') and typeof("machines"."barrel_mm3") in ('integer', 'null') and typeof("machines"."usable_thousandths") in ('integer', 'null') and typeof("machines"."least_shot_mg") in ('integer', 'null') and typeof("machines"."purge_mg") in ('integer', 'null') and typeof("machines"."melt_s") in ('integer', 'null') and typeof("machines"."cycle_s") in ('integer', 'null') and typeof("machines"."rated_watts") in ('integer', 'null') and typeof("machines"."created_at") in ('integer', 'null') and typeof("machines"."retired_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `machines_name_unique` ON `machines` (`name`);--> statement-breakpoint
CREATE TABLE `piece_kinds` (
	`piece_id` text NOT NULL,
	`kind` text NOT NULL,
	PRIMARY KEY(`piece_id`, `kind`),
	FOREIGN KEY (`piece_id`) REFERENCES `pieces`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "piece_kinds_kind" CHECK("piece_kinds"."kind" in ('lids', 'bottles', 'tubs', 'film', 'foam', 'cases', 'regrind', 'other'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE TABLE `piece_polymers` (
	`piece_id` text NOT NULL,
	`polymer` text NOT NULL,
	PRIMARY KEY(`piece_id`, `polymer`),
	FOREIGN KEY (`piece_id`) REFERENCES `pieces`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "piece_polymers_polymer" CHECK("piece_polymers"."polymer" in ('PET', 'PE-HD', 'PVC', 'PE-LD', 'PP', 'PS', 'ABS', 'PLA', 'PA', 'PC', 'O'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE TABLE `pieces` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`method` text NOT NULL,
	`length_um` integer,
	`width_um` integer,
	`thickness_um` integer,
	`trim_thousandths` integer,
	`pieces_per_sheet` integer,
	`volume_mm3` integer,
	`mass_mg` integer,
	`weighed_mg` integer,
	`weighed_pieces` integer,
	`weighed_at` integer,
	`price_cents` integer,
	`other_cost_cents` integer NOT NULL,
	`most_heated_thousandths` integer,
	`created_at` integer NOT NULL,
	`retired_at` integer,
	CONSTRAINT "pieces_method" CHECK("pieces"."method" in ('pressing', 'moulding', 'cutting')),
	CONSTRAINT "pieces_whole_numbers" CHECK(typeof("pieces"."length_um") in ('integer', 'null') and typeof("pieces"."width_um") in ('integer', 'null') and typeof("pieces"."thickness_um") in ('integer', 'null') and typeof("pieces"."trim_thousandths") in ('integer', 'null') and typeof("pieces"."pieces_per_sheet") in ('integer', 'null') and typeof("pieces"."volume_mm3") in ('integer', 'null') and typeof("pieces"."mass_mg") in ('integer', 'null') and typeof("pieces"."weighed_mg") in ('integer', 'null') and typeof("pieces"."weighed_pieces") in ('integer', 'null') and typeof("pieces"."weighed_at") in ('integer', 'null') and typeof("pieces"."price_cents") in ('integer', 'null') and typeof("pieces"."other_cost_cents") in ('integer', 'null') and typeof("pieces"."most_heated_thousandths") in ('integer', 'null') and typeof("pieces"."created_at") in ('integer', 'null') and typeof("pieces"."retired_at") in ('integer', 'null')),
	CONSTRAINT "pieces_sheet" CHECK(("pieces"."method" = 'moulding') = ("pieces"."length_um" is null) and ("pieces"."length_um" is null) = ("pieces"."thickness_um" is null) and ("pieces"."length_um" is null) = ("pieces"."width_um" is null)),
	CONSTRAINT "pieces_cutting" CHECK(("pieces"."method" = 'cutting') = ("pieces"."pieces_per_sheet" is not null) and ("pieces"."method" = 'pressing') = ("pieces"."trim_thousandths" is not null))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `pieces_name_unique` ON `pieces` (`name`);--> statement-breakpoint
CREATE TABLE `reservations` (
	`id` text PRIMARY KEY NOT NULL,
	`seq` integer NOT NULL,
	`run_id` text NOT NULL,
	`lot_id` text NOT NULL,
	`promised_grams` integer NOT NULL,
	`grams` integer NOT NULL,
	`state` text NOT NULL,
	`reserved_by` text NOT NULL,
	`reserved_at` integer NOT NULL,
	`lapses_at` integer NOT NULL,
	`warned_at` integer,
	`told_short_at` integer,
	`ended_at` integer,
	FOREIGN KEY (`run_id`) REFERENCES `runs`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`lot_id`) REFERENCES `lots`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`reserved_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "reservations_state" CHECK("reservations"."state" in ('held', 'used', 'released', 'lapsed')),
	CONSTRAINT "reservations_grams" CHECK("reservations"."promised_grams" > 0 and "reservations"."grams" between 0 and "reservations"."promised_grams"),
	CONSTRAINT "reservations_ended" CHECK(("reservations"."state" = 'held') = ("reservations"."ended_at" is null)),
	CONSTRAINT "reservations_whole_numbers" CHECK(typeof("reservations"."seq") in ('integer', 'null') and typeof("reservations"."promised_grams") in ('integer', 'null') and typeof("reservations"."grams") in ('integer', 'null') and typeof("reservations"."reserved_at") in ('integer', 'null') and typeof("reservations"."lapses_at") in ('integer', 'null') and typeof("reservations"."warned_at") in ('integer', 'null') and typeof("reservations"."told_short_at") in ('integer', 'null') and typeof("reservations"."ended_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `reservations_seq_unique` ON `reservations` (`seq`);--> statement-breakpoint
CREATE INDEX `reservations_run` ON `reservations` (`run_id`);--> statement-breakpoint
CREATE INDEX `reservations_held` ON `reservations` (`lot_id`,`seq`) WHERE "reservations"."state" = 'held';--> statement-breakpoint
CREATE TABLE `run_colours` (
	`run_id` text NOT NULL,
	`colour_code` text NOT NULL,
	`thousandths` integer NOT NULL,
	`grams` integer NOT NULL,
	PRIMARY KEY(`run_id`, `colour_code`),
	FOREIGN KEY (`run_id`) REFERENCES `runs`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`colour_code`) REFERENCES `colours`(`code`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "run_colours_share" CHECK("run_colours"."thousandths" between 1 and 1000 and "run_colours"."grams" >= 0),
	CONSTRAINT "run_colours_whole_numbers" CHECK(typeof("run_colours"."thousandths") in ('integer', 'null') and typeof("run_colours"."grams") in ('integer', 'null'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE TABLE `runs` (
	`id` text PRIMARY KEY NOT NULL,
	`number` integer NOT NULL,
	`holder_id` integer,
	`site_id` integer NOT NULL,
	`state` text NOT NULL,
	`piece_id` text NOT NULL,
	`polymer` text NOT NULL,
	`tool_id` text,
	`machine_id` text,
	`wanted_pieces` integer NOT NULL,
	`need_grams` integer NOT NULL,
	`planned_shots` integer,
	`planned_s` integer NOT NULL,
	`folded` integer NOT NULL,
	`seed` integer NOT NULL,
	`planned_by` text NOT NULL,
	`planned_at` integer NOT NULL,
	FOREIGN KEY (`holder_id`) REFERENCES `holders`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`site_id`) REFERENCES `sites`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`piece_id`) REFERENCES `pieces`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`tool_id`) REFERENCES `tools`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`machine_id`) REFERENCES `machines`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`planned_by`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "runs_state" CHECK("runs"."state" in ('planned', 'open', 'finished', 'called-off')),
	CONSTRAINT "runs_polymer" CHECK("runs"."polymer" in ('PET', 'PE-HD', 'PVC', 'PE-LD', 'PP', 'PS', 'ABS', 'PLA', 'PA', 'PC', 'O')),
	CONSTRAINT "runs_wanted" CHECK("runs"."wanted_pieces" > 0 and "runs"."need_grams" > 0),
	CONSTRAINT "runs_whole_numbers" CHECK(typeof("runs"."number") in ('integer', 'null') and typeof("runs"."wanted_pieces") in ('integer', 'null') and typeof("runs"."need_grams") in ('integer', 'null') and typeof("runs"."planned_shots") in ('integer', 'null') and typeof("runs"."planned_s") in ('integer', 'null') and typeof("runs"."folded") in ('integer', 'null') and typeof("runs"."seed") in ('integer', 'null') and typeof("runs"."planned_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `runs_number_unique` ON `runs` (`number`);--> statement-breakpoint
CREATE UNIQUE INDEX `runs_holder_id_unique` ON `runs` (`holder_id`);--> statement-breakpoint
CREATE INDEX `runs_state_number` ON `runs` (`state`,`number`);--> statement-breakpoint
CREATE TABLE `set_points` (
	`machine_id` text NOT NULL,
	`polymer` text NOT NULL,
	`celsius` integer NOT NULL,
	PRIMARY KEY(`machine_id`, `polymer`),
	FOREIGN KEY (`machine_id`) REFERENCES `machines`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "set_points_polymer" CHECK("set_points"."polymer" in ('PET', 'PE-HD', 'PVC', 'PE-LD', 'PP', 'PS', 'ABS', 'PLA', 'PA', 'PC', 'O')),
	CONSTRAINT "set_points_whole_numbers" CHECK(typeof("set_points"."celsius") in ('integer', 'null'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE TABLE `tools` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`piece_id` text NOT NULL,
	`cavities` integer NOT NULL,
	`gates` integer NOT NULL,
	`runner_mg` integer NOT NULL,
	`cost_cents` integer NOT NULL,
	`preheat_s` integer NOT NULL,
	`shots_before` integer NOT NULL,
	`service_at_shots` integer,
	`start_up_shots` integer NOT NULL,
	`good_thousandths` integer NOT NULL,
	`created_at` integer NOT NULL,
	`retired_at` integer,
	FOREIGN KEY (`piece_id`) REFERENCES `pieces`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "tools_cavities" CHECK("tools"."cavities" > 0 and "tools"."gates" > 0),
	CONSTRAINT "tools_good" CHECK("tools"."good_thousandths" between 1 and 1000),
	CONSTRAINT "tools_whole_numbers" CHECK(typeof("tools"."cavities") in ('integer', 'null') and typeof("tools"."gates") in ('integer', 'null') and typeof("tools"."runner_mg") in ('integer', 'null') and typeof("tools"."cost_cents") in ('integer', 'null') and typeof("tools"."preheat_s") in ('integer', 'null') and typeof("tools"."shots_before") in ('integer', 'null') and typeof("tools"."service_at_shots") in ('integer', 'null') and typeof("tools"."start_up_shots") in ('integer', 'null') and typeof("tools"."good_thousandths") in ('integer', 'null') and typeof("tools"."created_at") in ('integer', 'null') and typeof("tools"."retired_at") in ('integer', 'null'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `tools_name_unique` ON `tools` (`name`);--> statement-breakpoint
CREATE TABLE `__new_scheme_limits` (
	`id` integer PRIMARY KEY NOT NULL,
	`lot_weeks` integer,
	`storage_grams` integer,
	`storage_days` integer,
	`reservation_days` integer DEFAULT 14 NOT NULL,
	CONSTRAINT "scheme_limits_one_row" CHECK("__new_scheme_limits"."id" = 1),
	CONSTRAINT "scheme_limits_whole_numbers" CHECK(typeof("__new_scheme_limits"."lot_weeks") in ('integer', 'null') and typeof("__new_scheme_limits"."storage_grams") in ('integer', 'null') and typeof("__new_scheme_limits"."storage_days") in ('integer', 'null') and typeof("__new_scheme_limits"."reservation_days") in ('integer', 'null'))
);
--> statement-breakpoint
INSERT INTO `__new_scheme_limits`("id", "lot_weeks", "storage_grams", "storage_days", "reservation_days") SELECT "id", "lot_weeks", "storage_grams", "storage_days", 14 FROM `scheme_limits`;--> statement-breakpoint
DROP TABLE `scheme_limits`;--> statement-breakpoint
ALTER TABLE `__new_scheme_limits` RENAME TO `scheme_limits`;--> statement-breakpoint
