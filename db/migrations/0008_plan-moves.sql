PRAGMA foreign_keys=OFF;--> statement-breakpoint
CREATE TABLE `__new_pin` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`turn_id` integer NOT NULL,
	`starts_at` integer NOT NULL,
	`member_id` integer,
	`act_id` integer,
	`made_at` integer,
	`made_by_member_id` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`turn_id`) REFERENCES `turn`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`made_by_member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
INSERT INTO `__new_pin`("id", "studio_id", "turn_id", "starts_at", "member_id", "act_id") SELECT "id", "studio_id", "turn_id", "starts_at", "member_id", "act_id" FROM `pin`;--> statement-breakpoint
DROP TABLE `pin`;--> statement-breakpoint
ALTER TABLE `__new_pin` RENAME TO `pin`;--> statement-breakpoint
PRAGMA foreign_keys=ON;--> statement-breakpoint
CREATE UNIQUE INDEX `pin_turn_id_unique` ON `pin` (`turn_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `pin_studio_id_id_unique` ON `pin` (`studio_id`,`id`);--> statement-breakpoint
ALTER TABLE `plan_change` ADD `moved_at` integer;--> statement-breakpoint
ALTER TABLE `plan_entry` ADD `ready_at` integer;--> statement-breakpoint
ALTER TABLE `plan_entry` ADD `told_at` integer;