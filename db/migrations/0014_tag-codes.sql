ALTER TABLE `place` ADD `code` text;--> statement-breakpoint
CREATE UNIQUE INDEX `place_studio_id_code_unique` ON `place` (`studio_id`,`code`);--> statement-breakpoint
CREATE UNIQUE INDEX `carrier_studio_id_name_unique` ON `carrier` (`studio_id`,`name`);--> statement-breakpoint
CREATE INDEX `stay_on_carrier` ON `stay` (`carrier_id`) WHERE "stay"."carrier_id" is not null;