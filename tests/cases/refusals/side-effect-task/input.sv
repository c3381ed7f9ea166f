// expect: siren refused side-effect
module fire_station (
    input  logic       clk,
    input  logic       alarm,
    input  logic [7:0] street,
    output logic [7:0] siren, tally
);
    task count_one;
        tally <= tally + 8'd1;
    endtask
    always_ff @(posedge clk) begin
        if (alarm) begin
            siren <= street;
            count_one();
        end
    end
endmodule
