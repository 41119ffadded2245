CREATE TABLE `audit` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`table_name` text NOT NULL,
	`row_id` integer NOT NULL,
	`member_id` integer,
	`at` integer NOT NULL,
	`before` text,
	`after` text,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `audit_of_row` ON `audit` (`studio_id`,`table_name`,`row_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `audit_studio_id_id_unique` ON `audit` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `bench_tablet` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`name` text NOT NULL,
	`token_hash` text NOT NULL,
	`made_at` integer NOT NULL,
	`revoked_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `bench_tablet_token_hash_unique` ON `bench_tablet` (`token_hash`);--> statement-breakpoint
CREATE UNIQUE INDEX `bench_tablet_studio_id_id_unique` ON `bench_tablet` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `call_choice` (
	`studio_id` integer NOT NULL,
	`member_id` integer NOT NULL,
	`kind` text NOT NULL,
	`wanted` integer NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "call_choice_not_fire" CHECK("call_choice"."kind" <> 'rags')
);
--> statement-breakpoint
CREATE UNIQUE INDEX `call_choice_once` ON `call_choice` (`member_id`,`kind`);--> statement-breakpoint
CREATE TABLE `closure` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`member_id` integer,
	`name` text DEFAULT '' NOT NULL,
	`from_date` text NOT NULL,
	`to_date` text NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "closure_dates" CHECK("closure"."from_date" <= "closure"."to_date" and "closure"."from_date" glob '[0-9][0-9][0-9][0-9]-[0-9][0-9]-[0-9][0-9]' and "closure"."to_date" glob '[0-9][0-9][0-9][0-9]-[0-9][0-9]-[0-9][0-9]')
);
--> statement-breakpoint
CREATE INDEX `closure_of_studio` ON `closure` (`studio_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `closure_studio_id_id_unique` ON `closure` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `invitation` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`token_hash` text NOT NULL,
	`role` text NOT NULL,
	`email` text,
	`made_by_member_id` integer NOT NULL,
	`expires_at` integer NOT NULL,
	`used_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`made_by_member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "invitation_role" CHECK("invitation"."role" in ('owner', 'maker', 'helper'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `invitation_token_hash_unique` ON `invitation` (`token_hash`);--> statement-breakpoint
CREATE UNIQUE INDEX `invitation_studio_id_id_unique` ON `invitation` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `member` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`person_id` integer NOT NULL,
	`role` text NOT NULL,
	`pin_hash` text,
	`left_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`person_id`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE cascade,
	CONSTRAINT "member_role" CHECK("member"."role" in ('owner', 'maker', 'helper'))
);
--> statement-breakpoint
CREATE INDEX `member_of_person` ON `member` (`person_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `member_studio_id_id_unique` ON `member` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `member_studio_id_person_id_unique` ON `member` (`studio_id`,`person_id`);--> statement-breakpoint
CREATE TABLE `member_step_kind` (
	`studio_id` integer NOT NULL,
	`member_id` integer NOT NULL,
	`kind` text NOT NULL,
	PRIMARY KEY(`member_id`, `kind`),
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "member_step_kind_word" CHECK("member_step_kind"."kind" in ('coat', 'glue-up', 'light sanding', 'flat sanding', 'levelling', 'turn over', 'bench work', 'packing'))
);
--> statement-breakpoint
CREATE TABLE `open_hours` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`member_id` integer,
	`weekday` integer NOT NULL,
	`from_min` integer NOT NULL,
	`to_min` integer NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "open_hours_weekday" CHECK("open_hours"."weekday" between 1 and 7),
	CONSTRAINT "open_hours_span" CHECK(0 <= "open_hours"."from_min" and "open_hours"."from_min" < "open_hours"."to_min" and "open_hours"."to_min" <= 1440)
);
--> statement-breakpoint
CREATE INDEX `open_hours_of_studio` ON `open_hours` (`studio_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `open_hours_studio_id_id_unique` ON `open_hours` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `password_reset` (
	`token_hash` text PRIMARY KEY NOT NULL,
	`person_id` integer NOT NULL,
	`expires_at` integer NOT NULL,
	`used_at` integer,
	FOREIGN KEY (`person_id`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `person` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`email` text NOT NULL,
	`name` text NOT NULL,
	`password_hash` text NOT NULL,
	`demo` integer DEFAULT false NOT NULL,
	CONSTRAINT "person_email_lower" CHECK("person"."email" = lower("person"."email"))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `person_email_unique` ON `person` (`email`);--> statement-breakpoint
CREATE TABLE `server_key` (
	`name` text PRIMARY KEY NOT NULL,
	`value` text NOT NULL
);
--> statement-breakpoint
CREATE TABLE `session` (
	`id_hash` text PRIMARY KEY NOT NULL,
	`person_id` integer NOT NULL,
	`studio_id` integer,
	`made_at` integer NOT NULL,
	`seen_at` integer NOT NULL,
	`expires_at` integer NOT NULL,
	`revoked_at` integer,
	FOREIGN KEY (`person_id`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE set null
);
--> statement-breakpoint
CREATE INDEX `session_of_person` ON `session` (`person_id`);--> statement-breakpoint
CREATE TABLE `studio` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`name` text NOT NULL,
	`zone` text NOT NULL,
	`units` text DEFAULT 'metric' NOT NULL,
	`usual_temp_c` real DEFAULT 19 NOT NULL,
	`usual_rh` real DEFAULT 0.5 NOT NULL,
	`revision` integer DEFAULT 1 NOT NULL,
	`demo` integer DEFAULT false NOT NULL,
	`made_at` integer NOT NULL,
	CONSTRAINT "studio_units" CHECK("studio"."units" in ('metric', 'us')),
	CONSTRAINT "studio_usual_rh" CHECK("studio"."usual_rh" between 0 and 1),
	CONSTRAINT "studio_usual_temp" CHECK("studio"."usual_temp_c" between -40 and 60)
);
--> statement-breakpoint
CREATE TABLE `wall_link` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`name` text NOT NULL,
	`token_hash` text NOT NULL,
	`made_at` integer NOT NULL,
	`revoked_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `wall_link_token_hash_unique` ON `wall_link` (`token_hash`);--> statement-breakpoint
CREATE UNIQUE INDEX `wall_link_studio_id_id_unique` ON `wall_link` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `carrier` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`code` text NOT NULL,
	`name` text NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `carrier_studio_id_id_unique` ON `carrier` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `carrier_studio_id_code_unique` ON `carrier` (`studio_id`,`code`);--> statement-breakpoint
CREATE TABLE `place` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`room_id` integer NOT NULL,
	`name` text NOT NULL,
	`kind` text NOT NULL,
	`capacity` integer NOT NULL,
	`sort` integer DEFAULT 0 NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`room_id`) REFERENCES `room`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "place_kind" CHECK("place"."kind" in ('shelf', 'rail', 'hook', 'turntable', 'rack', 'clamps', 'press', 'bench', 'booth', 'drying cabinet', 'floor')),
	CONSTRAINT "place_capacity" CHECK("place"."capacity" > 0)
);
--> statement-breakpoint
CREATE INDEX `place_of_studio` ON `place` (`studio_id`,`sort`);--> statement-breakpoint
CREATE UNIQUE INDEX `place_studio_id_id_unique` ON `place` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `place_room_id_name_unique` ON `place` (`room_id`,`name`);--> statement-breakpoint
CREATE TABLE `reading` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`room_id` integer NOT NULL,
	`at` integer NOT NULL,
	`told_at` integer NOT NULL,
	`temp_c` real,
	`rh` real NOT NULL,
	`source` text NOT NULL,
	`doubt` real DEFAULT 0 NOT NULL,
	`member_id` integer,
	`client_key` text,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`room_id`) REFERENCES `room`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "reading_source" CHECK("reading"."source" in ('note', 'words', 'same', 'file', 'sensor', 'weather')),
	CONSTRAINT "reading_rh" CHECK("reading"."rh" between 0 and 1),
	CONSTRAINT "reading_temp" CHECK("reading"."temp_c" is null or "reading"."temp_c" between -40 and 60),
	CONSTRAINT "reading_doubt" CHECK("reading"."doubt" >= 0)
);
--> statement-breakpoint
CREATE UNIQUE INDEX `reading_once` ON `reading` (`room_id`,`at`,`source`);--> statement-breakpoint
CREATE UNIQUE INDEX `reading_client_key` ON `reading` (`studio_id`,`client_key`);--> statement-breakpoint
CREATE UNIQUE INDEX `reading_studio_id_id_unique` ON `reading` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `room` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`name` text NOT NULL,
	`sort` integer DEFAULT 0 NOT NULL,
	`heated` integer NOT NULL,
	`outdoor` integer DEFAULT false NOT NULL,
	`spray_area` integer DEFAULT false NOT NULL,
	`volume_m3` real,
	`exhaust_m3_h` real,
	`slept_in` integer DEFAULT false NOT NULL,
	`night_drop_c` real NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	CONSTRAINT "room_volume" CHECK("room"."volume_m3" is null or "room"."volume_m3" > 0),
	CONSTRAINT "room_exhaust" CHECK("room"."exhaust_m3_h" is null or "room"."exhaust_m3_h" >= 0),
	CONSTRAINT "room_night_drop" CHECK("room"."night_drop_c" between 0 and 30)
);
--> statement-breakpoint
CREATE UNIQUE INDEX `room_studio_id_id_unique` ON `room` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `room_studio_id_name_unique` ON `room` (`studio_id`,`name`);--> statement-breakpoint
CREATE TABLE `material` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`library_key` text,
	`name` text NOT NULL,
	`archived_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `material_studio_id_id_unique` ON `material` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `material_studio_id_library_key_unique` ON `material` (`studio_id`,`library_key`);--> statement-breakpoint
CREATE UNIQUE INDEX `material_studio_id_name_unique` ON `material` (`studio_id`,`name`);--> statement-breakpoint
CREATE TABLE `material_figure` (
	`studio_id` integer NOT NULL,
	`version_id` integer NOT NULL,
	`name` text NOT NULL,
	`low` real,
	`typical` real NOT NULL,
	`high` real,
	`unit` text NOT NULL,
	`source` text NOT NULL,
	`key` text NOT NULL,
	PRIMARY KEY(`version_id`, `name`),
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`version_id`) REFERENCES `material_version`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "material_figure_key" CHECK("material_figure"."key" in ('S', 'S-', 'M', 'CP', 'calc', 'planning value', 'own')),
	CONSTRAINT "material_figure_order" CHECK(coalesce("material_figure"."low", "material_figure"."typical") <= "material_figure"."typical" and "material_figure"."typical" <= coalesce("material_figure"."high", "material_figure"."typical"))
);
--> statement-breakpoint
CREATE TABLE `material_version` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`material_id` integer NOT NULL,
	`no` integer NOT NULL,
	`frozen` integer DEFAULT false NOT NULL,
	`kind` text NOT NULL,
	`film` text NOT NULL,
	`solvent` text NOT NULL,
	`must_lie_level` integer DEFAULT false NOT NULL,
	`drying_oil` integer DEFAULT false NOT NULL,
	`isocyanate` integer DEFAULT false NOT NULL,
	`gloves_until` text,
	`cautions` text NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`material_id`) REFERENCES `material`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "material_version_film" CHECK("material_version"."film" in ('open', 'joint'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `material_version_studio_id_id_unique` ON `material_version` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `material_version_material_id_no_unique` ON `material_version` (`material_id`,`no`);--> statement-breakpoint
CREATE TABLE `milestone` (
	`studio_id` integer NOT NULL,
	`version_id` integer NOT NULL,
	`ordinal` integer NOT NULL,
	`name` text NOT NULL,
	`driver` text NOT NULL,
	`low` real NOT NULL,
	`typical` real NOT NULL,
	`high` real NOT NULL,
	`hand_test` text,
	`source` text NOT NULL,
	`key` text NOT NULL,
	PRIMARY KEY(`version_id`, `ordinal`),
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`version_id`) REFERENCES `material_version`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "milestone_name" CHECK("milestone"."name" in ('set-to-touch', 'dust-free', 'tack-free', 'at-tack', 'dry-to-handle', 'dry-to-sand-lightly', 'dry-to-sand-flat', 'ready-to-recoat', 'out-of-clamps', 'full-strength', 'cured')),
	CONSTRAINT "milestone_driver" CHECK("milestone"."driver" in ('water', 'joint', 'solvent', 'oxidation', 'reaction', 'coalescence', 'moisture', 'gel')),
	CONSTRAINT "milestone_key" CHECK("milestone"."key" in ('S', 'S-', 'M', 'CP', 'calc', 'planning value', 'own')),
	CONSTRAINT "milestone_order" CHECK(0 < "milestone"."low" and "milestone"."low" <= "milestone"."typical" and "milestone"."typical" <= "milestone"."high")
);
--> statement-breakpoint
CREATE UNIQUE INDEX `milestone_version_id_name_unique` ON `milestone` (`version_id`,`name`);--> statement-breakpoint
CREATE TABLE `mix` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`material_id` integer NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`material_id`) REFERENCES `material`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `mix_material_id_unique` ON `mix` (`material_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `mix_studio_id_id_unique` ON `mix` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `mix_part` (
	`studio_id` integer NOT NULL,
	`mix_id` integer NOT NULL,
	`material_id` integer NOT NULL,
	`parts` real NOT NULL,
	`private` integer DEFAULT false NOT NULL,
	PRIMARY KEY(`mix_id`, `material_id`),
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`mix_id`) REFERENCES `mix`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`material_id`) REFERENCES `material`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "mix_part_parts" CHECK("mix_part"."parts" > 0)
);
--> statement-breakpoint
CREATE TABLE `recoat_window` (
	`studio_id` integer NOT NULL,
	`version_id` integer NOT NULL,
	`ordinal` integer NOT NULL,
	`from_min` real,
	`to_min` real,
	`recovery` text,
	`recovery_min` integer DEFAULT 0 NOT NULL,
	`source` text NOT NULL,
	`key` text NOT NULL,
	PRIMARY KEY(`version_id`, `ordinal`),
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`version_id`) REFERENCES `material_version`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "recoat_window_key" CHECK("recoat_window"."key" in ('S', 'S-', 'M', 'CP', 'calc', 'planning value', 'own')),
	CONSTRAINT "recoat_window_span" CHECK(coalesce("recoat_window"."from_min", 0) >= 0 and ("recoat_window"."to_min" is null or "recoat_window"."to_min" > coalesce("recoat_window"."from_min", 0)))
);
--> statement-breakpoint
CREATE TABLE `tin` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`material_id` integer NOT NULL,
	`opened_at` integer NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`material_id`) REFERENCES `material`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `tin_studio_id_id_unique` ON `tin` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `finishing_schedule` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`library_key` text,
	`name` text NOT NULL,
	`archived_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `finishing_schedule_studio_id_id_unique` ON `finishing_schedule` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `finishing_schedule_studio_id_library_key_unique` ON `finishing_schedule` (`studio_id`,`library_key`);--> statement-breakpoint
CREATE UNIQUE INDEX `finishing_schedule_studio_id_name_unique` ON `finishing_schedule` (`studio_id`,`name`);--> statement-breakpoint
CREATE TABLE `schedule_check` (
	`studio_id` integer NOT NULL,
	`step_id` integer NOT NULL,
	`ordinal` integer NOT NULL,
	`name` text NOT NULL,
	`after_min` integer NOT NULL,
	`minutes` integer NOT NULL,
	PRIMARY KEY(`step_id`, `ordinal`),
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`step_id`) REFERENCES `schedule_step`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "schedule_check_minutes" CHECK("schedule_check"."after_min" > 0 and "schedule_check"."minutes" > 0)
);
--> statement-breakpoint
CREATE TABLE `schedule_face` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`part_id` integer NOT NULL,
	`key` text NOT NULL,
	`name` text NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`part_id`) REFERENCES `schedule_part`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `schedule_face_studio_id_id_unique` ON `schedule_face` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `schedule_face_part_id_key_unique` ON `schedule_face` (`part_id`,`key`);--> statement-breakpoint
CREATE TABLE `schedule_link` (
	`studio_id` integer NOT NULL,
	`from_step_id` integer NOT NULL,
	`to_step_id` integer NOT NULL,
	`milestone` text,
	`risk` text DEFAULT 'p90' NOT NULL,
	`windowed` integer DEFAULT false NOT NULL,
	PRIMARY KEY(`from_step_id`, `to_step_id`),
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`from_step_id`) REFERENCES `schedule_step`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`to_step_id`) REFERENCES `schedule_step`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "schedule_link_milestone" CHECK("schedule_link"."milestone" in ('set-to-touch', 'dust-free', 'tack-free', 'at-tack', 'dry-to-handle', 'dry-to-sand-lightly', 'dry-to-sand-flat', 'ready-to-recoat', 'out-of-clamps', 'full-strength', 'cured')),
	CONSTRAINT "schedule_link_risk" CHECK("schedule_link"."risk" in ('likely', 'p90', 'p98')),
	CONSTRAINT "schedule_link_ends" CHECK("schedule_link"."from_step_id" <> "schedule_link"."to_step_id")
);
--> statement-breakpoint
CREATE TABLE `schedule_part` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`version_id` integer NOT NULL,
	`key` text NOT NULL,
	`name` text NOT NULL,
	`grip` text,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`version_id`) REFERENCES `schedule_version`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `schedule_part_studio_id_id_unique` ON `schedule_part` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `schedule_part_version_id_key_unique` ON `schedule_part` (`version_id`,`key`);--> statement-breakpoint
CREATE TABLE `schedule_step` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`version_id` integer NOT NULL,
	`key` text NOT NULL,
	`ordinal` integer NOT NULL,
	`name` text NOT NULL,
	`kind` text NOT NULL,
	`material_id` integer,
	`coat_size` text DEFAULT 'normal' NOT NULL,
	`ground` text DEFAULT 'primed' NOT NULL,
	`hold` text,
	`place_kind` text,
	`per_day` integer DEFAULT 1 NOT NULL,
	`days` integer DEFAULT 1 NOT NULL,
	`until_enough` integer DEFAULT false NOT NULL,
	`setup_min` integer DEFAULT 0 NOT NULL,
	`piece_min` integer NOT NULL,
	`clean_min` integer DEFAULT 0 NOT NULL,
	`release_min` integer DEFAULT 0 NOT NULL,
	`hands` integer DEFAULT 1 NOT NULL,
	`dust` text DEFAULT 'none' NOT NULL,
	`may_run_over` integer DEFAULT false NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`version_id`) REFERENCES `schedule_version`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`material_id`) REFERENCES `material`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "schedule_step_kind" CHECK("schedule_step"."kind" in ('coat', 'glue-up', 'light sanding', 'flat sanding', 'levelling', 'turn over', 'bench work', 'packing')),
	CONSTRAINT "schedule_step_size" CHECK("schedule_step"."coat_size" in ('thin', 'normal', 'full', 'flood')),
	CONSTRAINT "schedule_step_ground" CHECK("schedule_step"."ground" in ('porous', 'primed', 'sealed', 'non-absorbent')),
	CONSTRAINT "schedule_step_hold" CHECK("schedule_step"."hold" in ('clamps', 'press', 'weight')),
	CONSTRAINT "schedule_step_place" CHECK("schedule_step"."place_kind" in ('shelf', 'rail', 'hook', 'turntable', 'rack', 'clamps', 'press', 'bench', 'booth', 'drying cabinet', 'floor')),
	CONSTRAINT "schedule_step_dust" CHECK("schedule_step"."dust" in ('none', 'some', 'much')),
	CONSTRAINT "schedule_step_counts" CHECK("schedule_step"."per_day" > 0 and "schedule_step"."days" > 0 and "schedule_step"."hands" >= 0),
	CONSTRAINT "schedule_step_minutes" CHECK("schedule_step"."setup_min" >= 0 and "schedule_step"."piece_min" >= 0 and "schedule_step"."clean_min" >= 0 and "schedule_step"."release_min" >= 0)
);
--> statement-breakpoint
CREATE UNIQUE INDEX `schedule_step_studio_id_id_unique` ON `schedule_step` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `schedule_step_version_id_key_unique` ON `schedule_step` (`version_id`,`key`);--> statement-breakpoint
CREATE TABLE `schedule_step_target` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`step_id` integer NOT NULL,
	`part_id` integer NOT NULL,
	`face_id` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`step_id`) REFERENCES `schedule_step`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`part_id`) REFERENCES `schedule_part`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`face_id`) REFERENCES `schedule_face`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `schedule_step_target_studio_id_id_unique` ON `schedule_step_target` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `schedule_version` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`schedule_id` integer NOT NULL,
	`no` integer NOT NULL,
	`frozen` integer DEFAULT false NOT NULL,
	`summary` text DEFAULT '' NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`schedule_id`) REFERENCES `finishing_schedule`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `schedule_version_studio_id_id_unique` ON `schedule_version` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `schedule_version_schedule_id_no_unique` ON `schedule_version` (`schedule_id`,`no`);--> statement-breakpoint
CREATE TABLE `act` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`client_key` text NOT NULL,
	`kind` text NOT NULL,
	`done_at` integer NOT NULL,
	`told_at` integer NOT NULL,
	`actor` text NOT NULL,
	`member_id` integer,
	`replaces_act_id` integer,
	`root_act_id` integer,
	`voided` integer DEFAULT false NOT NULL,
	`body` text NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`replaces_act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`root_act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "act_kind" CHECK("act"."kind" in ('batch started', 'began', 'coat on', 'glue-up on', 'not on yet', 'it is out', 'work done', 'turned over', 'check done', 'touch test', 'stripped', 'moved', 'not there', 'seen', 'set aside', 'resumed', 'left out', 'dropped out', 'rejoined', 'enough', 'window missed', 'air', 'intake answered', 'room opened', 'rags answered', 'gone')),
	CONSTRAINT "act_actor" CHECK("act"."actor" in ('member', 'bench', 'sensor', 'system')),
	CONSTRAINT "act_member" CHECK(("act"."actor" = 'member') = ("act"."member_id" is not null))
);
--> statement-breakpoint
CREATE INDEX `act_told` ON `act` (`studio_id`,`told_at`);--> statement-breakpoint
CREATE UNIQUE INDEX `act_studio_id_id_unique` ON `act` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `act_studio_id_client_key_unique` ON `act` (`studio_id`,`client_key`);--> statement-breakpoint
CREATE UNIQUE INDEX `act_replaces_act_id_unique` ON `act` (`replaces_act_id`);--> statement-breakpoint
CREATE TABLE `act_subject` (
	`studio_id` integer NOT NULL,
	`act_id` integer NOT NULL,
	`part_id` integer NOT NULL,
	`done_at` integer NOT NULL,
	PRIMARY KEY(`act_id`, `part_id`),
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`part_id`) REFERENCES `part`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `act_of_part` ON `act_subject` (`part_id`,`act_id`);--> statement-breakpoint
CREATE TABLE `air_note` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`part_id` integer,
	`room_id` integer,
	`act_id` integer,
	`kind` text NOT NULL,
	`from_at` integer NOT NULL,
	`to_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`part_id`) REFERENCES `part`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`room_id`) REFERENCES `room`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "air_note_kind" CHECK("air_note"."kind" in ('sun', 'shade', 'warm air', 'moving', 'covered')),
	CONSTRAINT "air_note_where" CHECK(("air_note"."part_id" is null) <> ("air_note"."room_id" is null))
);
--> statement-breakpoint
CREATE INDEX `air_note_of_part` ON `air_note` (`part_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `air_note_studio_id_id_unique` ON `air_note` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `attachment` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`act_id` integer,
	`material_version_id` integer,
	`kind` text NOT NULL,
	`sha256` text NOT NULL,
	`bytes` integer NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`material_version_id`) REFERENCES `material_version`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "attachment_kind" CHECK("attachment"."kind" in ('photo', 'data sheet')),
	CONSTRAINT "attachment_bytes" CHECK("attachment"."bytes" > 0),
	CONSTRAINT "attachment_of_one" CHECK(("attachment"."act_id" is null) <> ("attachment"."material_version_id" is null))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `attachment_studio_id_id_unique` ON `attachment` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `batch` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`order_id` integer,
	`schedule_version_id` integer,
	`name` text NOT NULL,
	`act_id` integer NOT NULL,
	`starts_at` integer NOT NULL,
	`closed_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`order_id`) REFERENCES `order`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`schedule_version_id`) REFERENCES `schedule_version`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `batch_open` ON `batch` (`studio_id`) WHERE "batch"."closed_at" is null;--> statement-breakpoint
CREATE UNIQUE INDEX `batch_studio_id_id_unique` ON `batch` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `bench_speed` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`material_version_id` integer NOT NULL,
	`tin_id` integer,
	`state` text NOT NULL,
	`tests` integer NOT NULL,
	`act_id_upto` integer,
	`reset_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`material_version_id`) REFERENCES `material_version`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`tin_id`) REFERENCES `tin`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`act_id_upto`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `bench_speed_studio_id_id_unique` ON `bench_speed` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `branch` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`batch_id` integer NOT NULL,
	`from_step_key` text NOT NULL,
	`act_id` integer NOT NULL,
	`rejoined_act_id` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`batch_id`) REFERENCES `batch`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`rejoined_act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `branch_studio_id_id_unique` ON `branch` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `branch_act_id_unique` ON `branch` (`act_id`);--> statement-breakpoint
CREATE TABLE `coat` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`piece_id` integer NOT NULL,
	`turn_id` integer,
	`act_id` integer NOT NULL,
	`kind` text NOT NULL,
	`material_version_id` integer,
	`tin_id` integer,
	`mix_id` integer,
	`began_at` integer NOT NULL,
	`ended_at` integer NOT NULL,
	`size` text NOT NULL,
	`ground` text NOT NULL,
	`forced` integer DEFAULT false NOT NULL,
	`hold` text,
	`out_at` integer,
	`stripped_at` integer,
	`settled_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`piece_id`) REFERENCES `piece`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`turn_id`) REFERENCES `turn`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`material_version_id`) REFERENCES `material_version`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`tin_id`) REFERENCES `tin`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`mix_id`) REFERENCES `mix`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "coat_kind" CHECK("coat"."kind" in ('coat', 'glue-up')),
	CONSTRAINT "coat_size" CHECK("coat"."size" in ('thin', 'normal', 'full', 'flood')),
	CONSTRAINT "coat_ground" CHECK("coat"."ground" in ('porous', 'primed', 'sealed', 'non-absorbent')),
	CONSTRAINT "coat_hold" CHECK("coat"."hold" in ('clamps', 'press', 'weight')),
	CONSTRAINT "coat_span" CHECK("coat"."began_at" <= "coat"."ended_at")
);
--> statement-breakpoint
CREATE INDEX `coat_live` ON `coat` (`studio_id`,`piece_id`) WHERE "coat"."settled_at" is null;--> statement-breakpoint
CREATE UNIQUE INDEX `coat_studio_id_id_unique` ON `coat` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `coat_piece_id_act_id_turn_id_unique` ON `coat` (`piece_id`,`act_id`,`turn_id`);--> statement-breakpoint
CREATE TABLE `coat_target` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`coat_id` integer NOT NULL,
	`part_id` integer NOT NULL,
	`face_id` integer,
	`layer` integer NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`coat_id`) REFERENCES `coat`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`part_id`) REFERENCES `part`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`face_id`) REFERENCES `face`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "coat_target_from_one" CHECK("coat_target"."layer" >= 1)
);
--> statement-breakpoint
CREATE UNIQUE INDEX `coat_target_layer` ON `coat_target` (`face_id`,`layer`) WHERE "coat_target"."face_id" is not null;--> statement-breakpoint
CREATE INDEX `coat_target_of_coat` ON `coat_target` (`coat_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `coat_target_studio_id_id_unique` ON `coat_target` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `doubt` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`coat_id` integer NOT NULL,
	`cause` text NOT NULL,
	`from_at` integer NOT NULL,
	`cleared_act_id` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`coat_id`) REFERENCES `coat`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`cleared_act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "doubt_cause" CHECK("doubt"."cause" in ('chilled', 'failed', 'unknown'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `doubt_studio_id_id_unique` ON `doubt` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `doubt_coat_id_cause_unique` ON `doubt` (`coat_id`,`cause`);--> statement-breakpoint
CREATE TABLE `face` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`part_id` integer NOT NULL,
	`key` text NOT NULL,
	`name` text NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`part_id`) REFERENCES `part`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `face_studio_id_id_unique` ON `face` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `face_part_id_key_unique` ON `face` (`part_id`,`key`);--> statement-breakpoint
CREATE TABLE `intake` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`piece_id` integer NOT NULL,
	`question` text NOT NULL,
	`answer` text DEFAULT 'open' NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`piece_id`) REFERENCES `piece`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "intake_question" CHECK("intake"."question" in ('lead', 'green cloth', 'mould')),
	CONSTRAINT "intake_answer" CHECK("intake"."answer" in ('open', 'not tested', 'tested, none', 'tested, found'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `intake_studio_id_id_unique` ON `intake` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `intake_piece_id_question_unique` ON `intake` (`piece_id`,`question`);--> statement-breakpoint
CREATE TABLE `keep_out` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`room_id` integer NOT NULL,
	`from_act_id` integer NOT NULL,
	`from_at` integer NOT NULL,
	`opens_by_member_id` integer,
	`opened_act_id` integer,
	`opened_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`room_id`) REFERENCES `room`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`from_act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`opened_act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`opens_by_member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `keep_out_now` ON `keep_out` (`room_id`) WHERE "keep_out"."opened_at" is null;--> statement-breakpoint
CREATE UNIQUE INDEX `keep_out_studio_id_id_unique` ON `keep_out` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `order` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`name` text NOT NULL,
	`due_at` integer,
	`promised_at` integer,
	`weight` integer DEFAULT 1 NOT NULL,
	`closed_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	CONSTRAINT "order_weight" CHECK("order"."weight" between 1 and 5)
);
--> statement-breakpoint
CREATE UNIQUE INDEX `order_studio_id_id_unique` ON `order` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `part` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`piece_id` integer NOT NULL,
	`key` text NOT NULL,
	`name` text NOT NULL,
	`grip` text,
	`into_part_id` integer,
	`joined_act_id` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`piece_id`) REFERENCES `piece`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`into_part_id`) REFERENCES `part`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`joined_act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "part_joined" CHECK(("part"."into_part_id" is null) = ("part"."joined_act_id" is null))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `part_studio_id_id_unique` ON `part` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `part_piece_id_key_unique` ON `part` (`piece_id`,`key`);--> statement-breakpoint
CREATE TABLE `piece` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`batch_id` integer NOT NULL,
	`branch_id` integer,
	`name` text NOT NULL,
	`ordinal` integer NOT NULL,
	`size_units` integer DEFAULT 1 NOT NULL,
	`version` integer DEFAULT 1 NOT NULL,
	`gone_at` integer,
	`steps_done` integer DEFAULT 0 NOT NULL,
	`steps_of` integer DEFAULT 0 NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`batch_id`) REFERENCES `batch`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`branch_id`) REFERENCES `branch`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "piece_size" CHECK("piece"."size_units" > 0)
);
--> statement-breakpoint
CREATE INDEX `piece_here` ON `piece` (`studio_id`,`batch_id`) WHERE "piece"."gone_at" is null;--> statement-breakpoint
CREATE UNIQUE INDEX `piece_studio_id_id_unique` ON `piece` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `piece_batch_id_ordinal_unique` ON `piece` (`batch_id`,`ordinal`);--> statement-breakpoint
CREATE TABLE `piece_step` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`piece_id` integer NOT NULL,
	`key` text NOT NULL,
	`ordinal` real NOT NULL,
	`name` text NOT NULL,
	`kind` text NOT NULL,
	`origin` text NOT NULL,
	`schedule_step_id` integer,
	`inserted_by_act_id` integer,
	`material_version_id` integer,
	`status` text DEFAULT 'waiting' NOT NULL,
	`aside_reason` text,
	`coat_size` text DEFAULT 'normal' NOT NULL,
	`ground` text DEFAULT 'primed' NOT NULL,
	`hold` text,
	`place_kind` text,
	`until_enough` integer DEFAULT false NOT NULL,
	`setup_min` integer DEFAULT 0 NOT NULL,
	`piece_min` integer NOT NULL,
	`clean_min` integer DEFAULT 0 NOT NULL,
	`release_min` integer DEFAULT 0 NOT NULL,
	`hands` integer DEFAULT 1 NOT NULL,
	`dust` text DEFAULT 'none' NOT NULL,
	`may_run_over` integer DEFAULT false NOT NULL,
	`at_front` integer DEFAULT false NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`piece_id`) REFERENCES `piece`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`schedule_step_id`) REFERENCES `schedule_step`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`inserted_by_act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`material_version_id`) REFERENCES `material_version`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "piece_step_kind" CHECK("piece_step"."kind" in ('coat', 'glue-up', 'light sanding', 'flat sanding', 'levelling', 'turn over', 'bench work', 'packing')),
	CONSTRAINT "piece_step_origin" CHECK("piece_step"."origin" in ('schedule', 'recovery', 'branch', 'unplanned')),
	CONSTRAINT "piece_step_status" CHECK("piece_step"."status" in ('waiting', 'doing', 'resting', 'done', 'set aside', 'left out')),
	CONSTRAINT "piece_step_size" CHECK("piece_step"."coat_size" in ('thin', 'normal', 'full', 'flood')),
	CONSTRAINT "piece_step_ground" CHECK("piece_step"."ground" in ('porous', 'primed', 'sealed', 'non-absorbent')),
	CONSTRAINT "piece_step_hold" CHECK("piece_step"."hold" in ('clamps', 'press', 'weight')),
	CONSTRAINT "piece_step_place" CHECK("piece_step"."place_kind" in ('shelf', 'rail', 'hook', 'turntable', 'rack', 'clamps', 'press', 'bench', 'booth', 'drying cabinet', 'floor')),
	CONSTRAINT "piece_step_dust" CHECK("piece_step"."dust" in ('none', 'some', 'much')),
	CONSTRAINT "piece_step_aside" CHECK(("piece_step"."status" = 'set aside') = ("piece_step"."aside_reason" is not null))
);
--> statement-breakpoint
CREATE INDEX `piece_step_front` ON `piece_step` (`studio_id`,`piece_id`) WHERE "piece_step"."at_front" = 1;--> statement-breakpoint
CREATE INDEX `piece_step_open` ON `piece_step` (`studio_id`,`piece_id`) WHERE "piece_step"."status" in ('waiting', 'doing', 'resting', 'set aside');--> statement-breakpoint
CREATE UNIQUE INDEX `piece_step_studio_id_id_unique` ON `piece_step` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `piece_step_piece_id_key_unique` ON `piece_step` (`piece_id`,`key`);--> statement-breakpoint
CREATE TABLE `promise` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`order_id` integer NOT NULL,
	`made_at` integer NOT NULL,
	`likely_at` integer NOT NULL,
	`date_at` integer NOT NULL,
	`causes` text NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`order_id`) REFERENCES `order`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `promise_studio_id_id_unique` ON `promise` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `rag_duty` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`room_id` integer NOT NULL,
	`last_oil_at` integer NOT NULL,
	`last_oil_act_id` integer NOT NULL,
	`answer` text,
	`answered_at` integer,
	`answered_by_member_id` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`room_id`) REFERENCES `room`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`last_oil_act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`answered_by_member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "rag_duty_answer" CHECK("rag_duty"."answer" in ('flat outdoors', 'in water can', 'not dealt with'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `rag_duty_now` ON `rag_duty` (`room_id`) WHERE "rag_duty"."answered_at" is null;--> statement-breakpoint
CREATE UNIQUE INDEX `rag_duty_studio_id_id_unique` ON `rag_duty` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `stay` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`part_id` integer NOT NULL,
	`place_id` integer NOT NULL,
	`carrier_id` integer,
	`from_act_id` integer NOT NULL,
	`from_at` integer NOT NULL,
	`to_at` integer,
	`seen_at` integer NOT NULL,
	`missing_since` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`part_id`) REFERENCES `part`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`place_id`) REFERENCES `place`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`carrier_id`) REFERENCES `carrier`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`from_act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "stay_span" CHECK("stay"."to_at" is null or "stay"."to_at" >= "stay"."from_at")
);
--> statement-breakpoint
CREATE UNIQUE INDEX `stay_now` ON `stay` (`part_id`) WHERE "stay"."to_at" is null;--> statement-breakpoint
CREATE INDEX `stay_in_place_now` ON `stay` (`place_id`) WHERE "stay"."to_at" is null;--> statement-breakpoint
CREATE UNIQUE INDEX `stay_studio_id_id_unique` ON `stay` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `stay_part_id_from_act_id_unique` ON `stay` (`part_id`,`from_act_id`);--> statement-breakpoint
CREATE TABLE `step_link` (
	`studio_id` integer NOT NULL,
	`from_step_id` integer NOT NULL,
	`to_step_id` integer NOT NULL,
	`milestone` text,
	`risk` text NOT NULL,
	`windowed` integer DEFAULT false NOT NULL,
	PRIMARY KEY(`from_step_id`, `to_step_id`),
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`from_step_id`) REFERENCES `piece_step`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`to_step_id`) REFERENCES `piece_step`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	CONSTRAINT "step_link_milestone" CHECK("step_link"."milestone" in ('set-to-touch', 'dust-free', 'tack-free', 'at-tack', 'dry-to-handle', 'dry-to-sand-lightly', 'dry-to-sand-flat', 'ready-to-recoat', 'out-of-clamps', 'full-strength', 'cured')),
	CONSTRAINT "step_link_risk" CHECK("step_link"."risk" in ('likely', 'p90', 'p98'))
);
--> statement-breakpoint
CREATE INDEX `step_link_to` ON `step_link` (`to_step_id`);--> statement-breakpoint
CREATE TABLE `step_target` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`step_id` integer NOT NULL,
	`part_id` integer NOT NULL,
	`face_id` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`step_id`) REFERENCES `piece_step`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`part_id`) REFERENCES `part`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`face_id`) REFERENCES `face`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `step_target_of_step` ON `step_target` (`step_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `step_target_studio_id_id_unique` ON `step_target` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `touch_test` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`coat_id` integer NOT NULL,
	`witness_id` integer,
	`act_id` integer NOT NULL,
	`milestone` text NOT NULL,
	`at` integer NOT NULL,
	`reached` integer NOT NULL,
	`by_role` text NOT NULL,
	`forecast` text,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`coat_id`) REFERENCES `coat`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`witness_id`) REFERENCES `witness`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "touch_test_milestone" CHECK("touch_test"."milestone" in ('set-to-touch', 'dust-free', 'tack-free', 'at-tack', 'dry-to-handle', 'dry-to-sand-lightly', 'dry-to-sand-flat', 'ready-to-recoat', 'out-of-clamps', 'full-strength', 'cured')),
	CONSTRAINT "touch_test_role" CHECK("touch_test"."by_role" in ('owner', 'maker', 'helper'))
);
--> statement-breakpoint
CREATE INDEX `touch_test_of_coat` ON `touch_test` (`coat_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `touch_test_studio_id_id_unique` ON `touch_test` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `touch_test_act_id_coat_id_unique` ON `touch_test` (`act_id`,`coat_id`);--> statement-breakpoint
CREATE TABLE `turn` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`step_id` integer NOT NULL,
	`ordinal` integer NOT NULL,
	`day` integer DEFAULT 0 NOT NULL,
	`kind` text NOT NULL,
	`name` text DEFAULT '' NOT NULL,
	`check_after_min` integer,
	`minutes` integer NOT NULL,
	`status` text DEFAULT 'waiting' NOT NULL,
	`done_at` integer,
	`began_at` integer,
	`doing_member_id` integer,
	`not_on_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`step_id`) REFERENCES `piece_step`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`doing_member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "turn_kind" CHECK("turn"."kind" in ('work', 'check', 'release')),
	CONSTRAINT "turn_status" CHECK("turn"."status" in ('waiting', 'doing', 'done', 'left out')),
	CONSTRAINT "turn_check" CHECK(("turn"."kind" = 'check') = ("turn"."check_after_min" is not null)),
	CONSTRAINT "turn_done" CHECK(("turn"."status" = 'done') = ("turn"."done_at" is not null))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `turn_studio_id_id_unique` ON `turn` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `turn_step_id_ordinal_unique` ON `turn` (`step_id`,`ordinal`);--> statement-breakpoint
CREATE TABLE `witness` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`coat_id` integer NOT NULL,
	`name` text NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`coat_id`) REFERENCES `coat`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `witness_studio_id_id_unique` ON `witness` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `pin` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`turn_id` integer NOT NULL,
	`starts_at` integer NOT NULL,
	`member_id` integer,
	`act_id` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`turn_id`) REFERENCES `turn`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `pin_turn_id_unique` ON `pin` (`turn_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `pin_studio_id_id_unique` ON `pin` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `plan` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`made_at` integer NOT NULL,
	`revision` integer NOT NULL,
	`seed` integer NOT NULL,
	`status` text NOT NULL,
	`objective` text NOT NULL,
	`clashes` text NOT NULL,
	`current` integer NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	CONSTRAINT "plan_status" CHECK("plan"."status" in ('optimal', 'feasible', 'infeasible'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `plan_now` ON `plan` (`studio_id`) WHERE "plan"."current" = 1;--> statement-breakpoint
CREATE UNIQUE INDEX `plan_studio_id_id_unique` ON `plan` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `plan_change` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`plan_id` integer NOT NULL,
	`turn_id` integer NOT NULL,
	`was_at` integer,
	`is_at` integer,
	`why` text NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`plan_id`) REFERENCES `plan`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`turn_id`) REFERENCES `turn`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `plan_change_studio_id_id_unique` ON `plan_change` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `plan_change_plan_id_turn_id_unique` ON `plan_change` (`plan_id`,`turn_id`);--> statement-breakpoint
CREATE TABLE `plan_entry` (
	`studio_id` integer NOT NULL,
	`plan_id` integer NOT NULL,
	`turn_id` integer NOT NULL,
	`session_id` integer,
	`member_id` integer,
	`starts_at` integer NOT NULL,
	`ends_at` integer NOT NULL,
	`due_at` integer NOT NULL,
	`last_start_at` integer,
	`first_few` integer,
	`last_start_few_at` integer,
	`after_test` integer DEFAULT false NOT NULL,
	PRIMARY KEY(`plan_id`, `turn_id`),
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`plan_id`) REFERENCES `plan`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`turn_id`) REFERENCES `turn`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`session_id`) REFERENCES `plan_session`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "plan_entry_span" CHECK("plan_entry"."starts_at" <= "plan_entry"."ends_at")
);
--> statement-breakpoint
CREATE INDEX `plan_entry_when` ON `plan_entry` (`plan_id`,`starts_at`);--> statement-breakpoint
CREATE TABLE `plan_hold` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`plan_id` integer NOT NULL,
	`part_id` integer NOT NULL,
	`place_id` integer NOT NULL,
	`from_at` integer NOT NULL,
	`to_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`plan_id`) REFERENCES `plan`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`part_id`) REFERENCES `part`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`place_id`) REFERENCES `place`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `plan_hold_studio_id_id_unique` ON `plan_hold` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `plan_session` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`plan_id` integer NOT NULL,
	`family` text NOT NULL,
	`room_id` integer,
	`starts_at` integer NOT NULL,
	`ends_at` integer NOT NULL,
	`setup_min` integer NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`plan_id`) REFERENCES `plan`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`room_id`) REFERENCES `room`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `plan_session_studio_id_id_unique` ON `plan_session` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `prediction` (
	`studio_id` integer NOT NULL,
	`coat_id` integer NOT NULL,
	`ordinal` integer NOT NULL,
	`milestone` text NOT NULL,
	`likely_at` integer,
	`p90_at` integer,
	`p98_at` integer,
	`reached_at` integer,
	`reason` text,
	PRIMARY KEY(`coat_id`, `milestone`),
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`coat_id`) REFERENCES `coat`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	CONSTRAINT "prediction_milestone" CHECK("prediction"."milestone" in ('set-to-touch', 'dust-free', 'tack-free', 'at-tack', 'dry-to-handle', 'dry-to-sand-lightly', 'dry-to-sand-flat', 'ready-to-recoat', 'out-of-clamps', 'full-strength', 'cured')),
	CONSTRAINT "prediction_reason" CHECK("prediction"."reason" in ('below-minimum', 'too-damp', 'never', 'outside-sheet'))
);
--> statement-breakpoint
CREATE TABLE `window_prediction` (
	`studio_id` integer NOT NULL,
	`coat_id` integer NOT NULL,
	`ordinal` integer NOT NULL,
	`opens_at` integer,
	`shuts_at` integer,
	PRIMARY KEY(`coat_id`, `ordinal`),
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`coat_id`) REFERENCES `coat`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `cause` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`kind` text NOT NULL,
	`subject_type` text NOT NULL,
	`subject_id` integer NOT NULL,
	`group_key` text NOT NULL,
	`made_at` integer NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `cause_studio_id_id_unique` ON `cause` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `cause_studio_id_kind_subject_type_subject_id_group_key_unique` ON `cause` (`studio_id`,`kind`,`subject_type`,`subject_id`,`group_key`);--> statement-breakpoint
CREATE TABLE `delivery` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`reminder_id` integer NOT NULL,
	`channel` text NOT NULL,
	`endpoint_id` integer NOT NULL,
	`member_id` integer NOT NULL,
	`status` text NOT NULL,
	`stable_id` text NOT NULL,
	`tries` integer DEFAULT 0 NOT NULL,
	`next_try_at` integer,
	`changed_at` integer NOT NULL,
	`problem` text,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`reminder_id`) REFERENCES `reminder`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "delivery_channel" CHECK("delivery"."channel" in ('push', 'mail')),
	CONSTRAINT "delivery_status" CHECK("delivery"."status" in ('queued', 'sending', 'accepted', 'unknown', 'gone', 'failed'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `delivery_stable_id_unique` ON `delivery` (`stable_id`);--> statement-breakpoint
CREATE INDEX `delivery_open` ON `delivery` (`status`,`next_try_at`);--> statement-breakpoint
CREATE UNIQUE INDEX `delivery_studio_id_id_unique` ON `delivery` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `delivery_reminder_id_channel_endpoint_id_unique` ON `delivery` (`reminder_id`,`channel`,`endpoint_id`);--> statement-breakpoint
CREATE TABLE `reminder` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`cause_id` integer NOT NULL,
	`stage` text NOT NULL,
	`repeat` integer DEFAULT 0 NOT NULL,
	`due_at` integer NOT NULL,
	`status` text DEFAULT 'due' NOT NULL,
	`lease_until` integer,
	`sent_at` integer,
	`answered_act_id` integer,
	`title` text NOT NULL,
	`body` text NOT NULL,
	`path` text NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`cause_id`) REFERENCES `cause`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`answered_act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "reminder_status" CHECK("reminder"."status" in ('due', 'claimed', 'sent', 'answered', 'withdrawn'))
);
--> statement-breakpoint
CREATE INDEX `reminder_due` ON `reminder` (`status`,`due_at`);--> statement-breakpoint
CREATE UNIQUE INDEX `reminder_studio_id_id_unique` ON `reminder` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `reminder_cause_id_stage_repeat_unique` ON `reminder` (`cause_id`,`stage`,`repeat`);--> statement-breakpoint
CREATE TABLE `seen` (
	`studio_id` integer NOT NULL,
	`reminder_id` integer NOT NULL,
	`member_id` integer NOT NULL,
	`at` integer NOT NULL,
	PRIMARY KEY(`reminder_id`, `member_id`),
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`reminder_id`) REFERENCES `reminder`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `subscription` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`member_id` integer NOT NULL,
	`endpoint` text NOT NULL,
	`p256dh` text NOT NULL,
	`auth` text NOT NULL,
	`device` text DEFAULT '' NOT NULL,
	`made_at` integer NOT NULL,
	`gone_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `subscription_studio_id_id_unique` ON `subscription` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `subscription_studio_id_endpoint_unique` ON `subscription` (`studio_id`,`endpoint`);