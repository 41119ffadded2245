CREATE TABLE `calendar_link` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`member_id` integer NOT NULL,
	`token_hash` text NOT NULL,
	`everybody` integer NOT NULL,
	`made_at` integer NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `calendar_link_token_hash_unique` ON `calendar_link` (`token_hash`);--> statement-breakpoint
CREATE UNIQUE INDEX `calendar_link_studio_id_id_unique` ON `calendar_link` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `calendar_link_member_id_unique` ON `calendar_link` (`member_id`);