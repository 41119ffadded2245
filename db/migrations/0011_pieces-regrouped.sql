PRAGMA foreign_keys=OFF;--> statement-breakpoint
CREATE TABLE `__new_act` (
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
	CONSTRAINT "act_kind" CHECK("__new_act"."kind" in ('batch started', 'began', 'coat on', 'glue-up on', 'not on yet', 'it is out', 'work done', 'turned over', 'check done', 'touch test', 'stripped', 'moved', 'not there', 'seen', 'set aside', 'resumed', 'left out', 'dropped out', 'rejoined', 'enough', 'window missed', 'air', 'intake answered', 'room opened', 'rags answered', 'gone', 'back', 'regrouped', 'cancelled')),
	CONSTRAINT "act_actor" CHECK("__new_act"."actor" in ('member', 'bench', 'sensor', 'system')),
	CONSTRAINT "act_member" CHECK(("__new_act"."actor" = 'member') = ("__new_act"."member_id" is not null))
);
--> statement-breakpoint
INSERT INTO `__new_act`("id", "studio_id", "client_key", "kind", "done_at", "told_at", "actor", "member_id", "replaces_act_id", "root_act_id", "voided", "body") SELECT "id", "studio_id", "client_key", "kind", "done_at", "told_at", "actor", "member_id", "replaces_act_id", "root_act_id", "voided", "body" FROM `act`;--> statement-breakpoint
DROP TABLE `act`;--> statement-breakpoint
ALTER TABLE `__new_act` RENAME TO `act`;--> statement-breakpoint
PRAGMA foreign_keys=ON;--> statement-breakpoint
CREATE INDEX `act_told` ON `act` (`studio_id`,`told_at`);--> statement-breakpoint
CREATE UNIQUE INDEX `act_studio_id_id_unique` ON `act` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `act_studio_id_client_key_unique` ON `act` (`studio_id`,`client_key`);--> statement-breakpoint
CREATE UNIQUE INDEX `act_replaces_act_id_unique` ON `act` (`replaces_act_id`);--> statement-breakpoint
ALTER TABLE `piece` ADD `gone_how` text;--> statement-breakpoint
CREATE INDEX `piece_gone` ON `piece` (`studio_id`,`gone_at`) WHERE "piece"."gone_at" is not null;