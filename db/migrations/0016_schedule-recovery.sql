ALTER TABLE `schedule_link` ADD `recovery` text;--> statement-breakpoint
ALTER TABLE `schedule_link` ADD `recovery_min` integer;