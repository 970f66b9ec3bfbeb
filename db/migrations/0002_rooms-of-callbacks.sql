ALTER TABLE `room_bookings` DROP CONSTRAINT `room_bookings_one`;--> statement-breakpoint
ALTER TABLE `room_bookings` ADD `callback_round_id` binary(16);--> statement-breakpoint
ALTER TABLE `room_bookings` ADD CONSTRAINT `room_bookings_round` UNIQUE(`callback_round_id`);--> statement-breakpoint
ALTER TABLE `room_bookings` ADD CONSTRAINT `room_bookings_one` CHECK ((`room_bookings`.`audition_room_id` is not null) + (`room_bookings`.`call_id` is not null) + (`room_bookings`.`callback_round_id` is not null) = 1);--> statement-breakpoint
ALTER TABLE `room_bookings` ADD CONSTRAINT `room_bookings_round_fk` FOREIGN KEY (`callback_round_id`) REFERENCES `callback_rounds`(`id`) ON DELETE no action ON UPDATE no action;