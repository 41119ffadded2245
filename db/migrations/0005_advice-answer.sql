CREATE TABLE `advice_answer` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`coat_id` integer NOT NULL,
	`code` text NOT NULL,
	`answer` text NOT NULL,
	`member_id` integer NOT NULL,
	`at` integer NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`coat_id`) REFERENCES `coat`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "advice_answer_word" CHECK("advice_answer"."answer" in ('seen', 'waiting', 'going on', 'haze'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `advice_answer_studio_id_id_unique` ON `advice_answer` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `advice_answer_coat_id_code_unique` ON `advice_answer` (`coat_id`,`code`);