PRAGMA foreign_keys=OFF;--> statement-breakpoint
CREATE TABLE `__new_advice_answer` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`coat_id` integer,
	`turn_id` integer,
	`code` text NOT NULL,
	`answer` text NOT NULL,
	`gap_c` real,
	`member_id` integer NOT NULL,
	`at` integer NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`coat_id`) REFERENCES `coat`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`turn_id`) REFERENCES `turn`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "advice_answer_word" CHECK("__new_advice_answer"."answer" in ('seen', 'waiting', 'going on', 'haze')),
	CONSTRAINT "advice_answer_about" CHECK(("__new_advice_answer"."coat_id" is null) <> ("__new_advice_answer"."turn_id" is null))
);
--> statement-breakpoint
INSERT INTO `__new_advice_answer`("id", "studio_id", "coat_id", "turn_id", "code", "answer", "gap_c", "member_id", "at") SELECT "id", "studio_id", "coat_id", null, "code", "answer", null, "member_id", "at" FROM `advice_answer`;--> statement-breakpoint
DROP TABLE `advice_answer`;--> statement-breakpoint
ALTER TABLE `__new_advice_answer` RENAME TO `advice_answer`;--> statement-breakpoint
PRAGMA foreign_keys=ON;--> statement-breakpoint
CREATE UNIQUE INDEX `advice_answer_studio_id_id_unique` ON `advice_answer` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `advice_answer_coat_id_code_unique` ON `advice_answer` (`coat_id`,`code`);--> statement-breakpoint
CREATE UNIQUE INDEX `advice_answer_turn_id_code_unique` ON `advice_answer` (`turn_id`,`code`);