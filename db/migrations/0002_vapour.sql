CREATE TABLE `statement` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`kind` text NOT NULL,
	`text` text NOT NULL,
	`member_id` integer NOT NULL,
	`at` integer NOT NULL,
	`withdrawn_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "statement_kind" CHECK("statement"."kind" in ('isocyanate')),
	CONSTRAINT "statement_text" CHECK(length("statement"."text") between 1 and 1000)
);
--> statement-breakpoint
CREATE UNIQUE INDEX `statement_now` ON `statement` (`studio_id`,`kind`) WHERE "statement"."withdrawn_at" is null;--> statement-breakpoint
CREATE UNIQUE INDEX `statement_studio_id_id_unique` ON `statement` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `studio_rule` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`text` text NOT NULL,
	`member_id` integer NOT NULL,
	`at` integer NOT NULL,
	`withdrawn_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "studio_rule_text" CHECK(length("studio_rule"."text") between 1 and 400)
);
--> statement-breakpoint
CREATE UNIQUE INDEX `studio_rule_studio_id_id_unique` ON `studio_rule` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `vapour_limit` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`material_id` integer NOT NULL,
	`solvent_key` text,
	`limit_mg_m3` real,
	`ceiling_mg_m3` real,
	`lel_grams_m3` real,
	`voc_grams_per_litre` real,
	`exempt_grams_per_litre` real,
	`member_id` integer NOT NULL,
	`at` integer NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`material_id`) REFERENCES `material`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "vapour_limit_figures" CHECK(coalesce("vapour_limit"."limit_mg_m3", 1) > 0 and coalesce("vapour_limit"."ceiling_mg_m3", 1) > 0 and coalesce("vapour_limit"."lel_grams_m3", 1) > 0 and coalesce("vapour_limit"."voc_grams_per_litre", 0) >= 0 and coalesce("vapour_limit"."exempt_grams_per_litre", 0) >= 0)
);
--> statement-breakpoint
CREATE UNIQUE INDEX `vapour_limit_once` ON `vapour_limit` (`studio_id`,`material_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `vapour_limit_studio_id_id_unique` ON `vapour_limit` (`studio_id`,`id`);--> statement-breakpoint
CREATE TABLE `vapour_start` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`room_id` integer NOT NULL,
	`act_id` integer NOT NULL,
	`at` integer NOT NULL,
	`member_id` integer,
	`exhaust` text NOT NULL,
	`flames_off` integer NOT NULL,
	`nobody_else` integer NOT NULL,
	`ended_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`room_id`) REFERENCES `room`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "vapour_start_exhaust" CHECK("vapour_start"."exhaust" in ('running', 'none')),
	CONSTRAINT "vapour_start_answers" CHECK("vapour_start"."flames_off" = 1 and "vapour_start"."nobody_else" = 1)
);
--> statement-breakpoint
CREATE INDEX `vapour_start_of_room` ON `vapour_start` (`studio_id`,`room_id`,`at`);--> statement-breakpoint
CREATE UNIQUE INDEX `vapour_start_studio_id_id_unique` ON `vapour_start` (`studio_id`,`id`);--> statement-breakpoint
PRAGMA foreign_keys=OFF;--> statement-breakpoint
CREATE TABLE `__new_call_choice` (
	`studio_id` integer NOT NULL,
	`member_id` integer NOT NULL,
	`kind` text NOT NULL,
	`wanted` integer NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "call_choice_not_fire" CHECK("__new_call_choice"."kind" not in ('rags', 'vapour'))
);
--> statement-breakpoint
INSERT INTO `__new_call_choice`("studio_id", "member_id", "kind", "wanted") SELECT "studio_id", "member_id", "kind", "wanted" FROM `call_choice`;--> statement-breakpoint
DROP TABLE `call_choice`;--> statement-breakpoint
ALTER TABLE `__new_call_choice` RENAME TO `call_choice`;--> statement-breakpoint
PRAGMA foreign_keys=ON;--> statement-breakpoint
CREATE UNIQUE INDEX `call_choice_once` ON `call_choice` (`member_id`,`kind`);--> statement-breakpoint
CREATE TABLE `__new_intake` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`piece_id` integer NOT NULL,
	`question` text NOT NULL,
	`answer` text DEFAULT 'open' NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`piece_id`) REFERENCES `piece`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "intake_question" CHECK("__new_intake"."question" in ('lead', 'green cloth', 'mould', 'metal coating')),
	CONSTRAINT "intake_answer" CHECK("__new_intake"."answer" in ('open', 'not tested', 'tested, none', 'tested, found'))
);
--> statement-breakpoint
INSERT INTO `__new_intake`("id", "studio_id", "piece_id", "question", "answer") SELECT "id", "studio_id", "piece_id", "question", "answer" FROM `intake`;--> statement-breakpoint
DROP TABLE `intake`;--> statement-breakpoint
ALTER TABLE `__new_intake` RENAME TO `intake`;--> statement-breakpoint
CREATE UNIQUE INDEX `intake_studio_id_id_unique` ON `intake` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `intake_piece_id_question_unique` ON `intake` (`piece_id`,`question`);--> statement-breakpoint
ALTER TABLE `room` ADD `air_changes_per_hour` real;--> statement-breakpoint
ALTER TABLE `room` ADD `air_moves` text;--> statement-breakpoint
ALTER TABLE `coat` ADD `area_m2` real;--> statement-breakpoint
ALTER TABLE `coat` ADD `thinner_grams` real DEFAULT 0 NOT NULL;--> statement-breakpoint
ALTER TABLE `piece` ADD `area_m2` real;