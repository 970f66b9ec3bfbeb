-- Application-time periods: what cannot be held twice at once cannot be written twice at once.
ALTER TABLE `room_bookings` ADD PERIOD FOR `held`(`starts_at`, `ends_at`);
--> statement-breakpoint
ALTER TABLE `room_bookings` ADD CONSTRAINT `room_bookings_held` UNIQUE (`room_id`, `held` WITHOUT OVERLAPS);
--> statement-breakpoint
ALTER TABLE `pianist_sessions` ADD PERIOD FOR `held`(`starts_at`, `ends_at`);
--> statement-breakpoint
ALTER TABLE `pianist_sessions` ADD CONSTRAINT `pianist_sessions_held` UNIQUE (`bookee_id`, `held` WITHOUT OVERLAPS);
--> statement-breakpoint
ALTER TABLE `slots` ADD PERIOD FOR `held`(`starts_at`, `ends_at`);
--> statement-breakpoint
ALTER TABLE `slots` ADD CONSTRAINT `slots_held` UNIQUE (`audition_room_id`, `held` WITHOUT OVERLAPS);
