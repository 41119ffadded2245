ALTER TABLE `vapour_limit` ADD `spread_m2_per_litre` real;--> statement-breakpoint
ALTER TABLE `vapour_limit` ADD `touch_dry_minutes` real;