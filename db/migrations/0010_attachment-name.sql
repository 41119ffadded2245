ALTER TABLE `attachment` ADD `name` text;--> statement-breakpoint
ALTER TABLE `attachment` ADD `added_at` integer;